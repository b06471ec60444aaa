import type { ReactElement } from 'react';

/** One line of a sum: its name, what it adds, and what is behind it. */
export interface Term {
  key: string;
  name: string;
  effect: string;
  because: readonly string[];
}

/** A sum line by line, from the first, which it starts with, to the last, which comes out. */
export function TermList({ terms }: { terms: readonly Term[] }): ReactElement {
  return (
    <dl className="d-terms">
      {terms.map(({ key, name, effect, because }, index) => (
        <div key={key} data-end={index === 0 ? 'first' : index === terms.length - 1 ? 'last' : undefined}>
          <dt>{name}</dt>
          <dd className="d-terms-effect">{effect}</dd>
          {because.map((line) => <dd key={line} className="d-terms-because">{line}</dd>)}
        </div>
      ))}
    </dl>
  );
}
