import { useRef, type ReactElement, type ReactNode } from 'react';
import { usePageArrival } from '@/components/ui/usePageArrival';

export interface ScreenProps {
  /** Title of the browser's page, and the headline unless there is another. */
  title: string;
  /** The headline: the answer to the screen's question, in words. */
  headline?: string;
  /** Small line above the headline: where we are. */
  kicker?: ReactNode;
  /** Small text at the right of the kicker, such as the weather. */
  aside?: ReactNode;
  /** Buttons beside the headline on a wide page, under it on a phone. */
  actions?: ReactNode;
  /** `text` 680 px, `form` 560 px, `page` 1100 px (list and detail, charts), `full` all there is. */
  width?: 'text' | 'form' | 'page' | 'full';
  children: ReactNode;
}

/** The main part of a page: its title, its only `h1`, its width. Stands inside `AppShell` or `PublicShell`. */
export function Screen({ title, headline = title, kicker, aside, actions, width = 'page', children }: ScreenProps): ReactElement {
  const heading = useRef<HTMLHeadingElement>(null);
  usePageArrival(title, heading);
  return (
    <main id="main" className="d-screen" data-width={width}>
      <header className="d-screen-head">
        {(kicker !== undefined || aside !== undefined) && (
          <div className="d-screen-kicker">
            <div>{kicker}</div>
            <div>{aside}</div>
          </div>
        )}
        <div className="d-screen-headline">
          <h1 ref={heading} tabIndex={-1}>{headline}</h1>
          {actions !== undefined && <div className="d-screen-actions">{actions}</div>}
        </div>
      </header>
      {children}
    </main>
  );
}
