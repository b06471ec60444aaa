import type { ReactElement, ReactNode } from 'react';

/** A link to another site or to a file the server makes; `newTab` says so to assistive technology. */
export function OutsideLink({ href, children, newTab }: { href: string; children: ReactNode; newTab?: boolean }): ReactElement {
  return (
    <a className="d-link" data-kind="inline" href={href} {...(newTab ? { target: '_blank', rel: 'noreferrer' } : {})}>
      {children}
      {newTab && <span className="d-hidden"> (opens in a new tab)</span>}
    </a>
  );
}
