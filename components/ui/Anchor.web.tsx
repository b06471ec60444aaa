import type { AnchorHTMLAttributes, ReactElement, Ref } from 'react';

export interface AnchorProps extends AnchorHTMLAttributes<HTMLAnchorElement> {
  ref?: Ref<HTMLAnchorElement>;
  /** The router's link hands this to its child on every platform; on the web it also hands `onClick`, which does the work. */
  onPress?: unknown;
}

/** The child of a router's `Link asChild`: an `<a>` with only what an `<a>` may take. */
export function Anchor({ onPress: _onPress, children, ...anchor }: AnchorProps): ReactElement {
  return <a {...anchor}>{children}</a>;
}
