import { Link } from 'expo-router';
import type { ReactElement, ReactNode } from 'react';
import { SkipLink } from '@/components/shell/SkipLink';
import { Anchor } from '@/components/ui/Anchor';
import { Logo } from '@/components/ui/Logo';
import { TextLink } from '@/components/ui/TextLink';

export interface PublicShellProps {
  /** Links at the right of the header; default is the way to sign in. `null` for none. */
  links?: ReactNode;
  /** Stands above everything, such as the demonstration clock. */
  top?: ReactNode;
  children: ReactNode;
}

/** Frame of the pages that need no account: a small header, and the page. */
export function PublicShell({ links, top, children }: PublicShellProps): ReactElement {
  return (
    <div className="d-public">
      <SkipLink />
      {top !== undefined && <div className="d-app-top">{top}</div>}
      <header className="d-public-head">
        <Link href="/" asChild>
          <Anchor className="d-rail-logo" aria-label="Dapple">
            <Logo />
          </Anchor>
        </Link>
        <nav aria-label="Dapple">
          {links === undefined ? <TextLink kind="standalone" href={'/sign-in'}>Sign in</TextLink> : links}
        </nav>
      </header>
      {children}
    </div>
  );
}
