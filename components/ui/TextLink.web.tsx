import { Link, type Href } from 'expo-router';
import type { ReactElement, ReactNode } from 'react';
import { Anchor } from '@/components/ui/Anchor';

export interface TextLinkProps {
  href: Href;
  children: ReactNode;
  /** `stretched` makes the nearest card the target; other actions in the card stay above it. */
  kind?: 'inline' | 'standalone' | 'stretched' | 'title';
  replace?: boolean;
  /** Marks the place where the reader is. */
  current?: boolean;
  'aria-label'?: string;
  testID?: string;
}

/** A link in words. `standalone` is a line of its own with room for a finger. */
export function TextLink({ href, children, kind = 'inline', replace, current, testID, ...aria }: TextLinkProps): ReactElement {
  return (
    <Link href={href} replace={replace} asChild>
      <Anchor {...aria} className="d-link" data-kind={kind} aria-current={current ? 'page' : undefined} data-testid={testID}>
        {children}
      </Anchor>
    </Link>
  );
}
