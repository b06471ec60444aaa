import type { ReactElement } from 'react';

/** First stop of the Tab key: past the navigation, to the headline. */
export function SkipLink(): ReactElement {
  return (
    <a
      className="d-skip"
      href="#main"
      onClick={(event) => {
        event.preventDefault();
        const heading = document.querySelector<HTMLElement>('#main h1');
        heading?.focus();
        heading?.scrollIntoView();
      }}
    >
      Skip to the page
    </a>
  );
}
