import { useId, useRef, type KeyboardEvent, type ReactElement, type ReactNode } from 'react';

export interface TabsProps<V extends string> {
  label: string;
  tabs: readonly { id: V; label: string }[];
  value: V;
  onChange: (id: V) => void;
  /** What the chosen tab shows. */
  children: ReactNode;
}

/** Parts of one screen of which one shows at a time. Arrow keys, Home and End move between them. */
export function Tabs<V extends string>({ label, tabs, value, onChange, children }: TabsProps<V>): ReactElement {
  const id = useId();
  const buttons = useRef(new Map<V, HTMLButtonElement>());

  const move = (event: KeyboardEvent): void => {
    const here = tabs.findIndex((tab) => tab.id === value);
    const target = { ArrowRight: (here + 1) % tabs.length, ArrowLeft: (here - 1 + tabs.length) % tabs.length, Home: 0, End: tabs.length - 1 }[event.key];
    const next = target === undefined ? undefined : tabs[target];
    if (!next) return;
    event.preventDefault();
    onChange(next.id);
    buttons.current.get(next.id)?.focus();
  };

  return (
    <div className="d-tabs">
      <div role="tablist" aria-label={label} className="d-tablist" onKeyDown={move}>
        {tabs.map((tab) => (
          <button
            key={tab.id}
            ref={(button) => {
              if (button) buttons.current.set(tab.id, button);
              else buttons.current.delete(tab.id);
            }}
            type="button"
            role="tab"
            id={`${id}-${tab.id}`}
            className="d-tab"
            aria-selected={tab.id === value}
            aria-controls={`${id}-panel`}
            tabIndex={tab.id === value ? 0 : -1}
            onClick={() => onChange(tab.id)}
          >
            {tab.label}
          </button>
        ))}
      </div>
      <div role="tabpanel" id={`${id}-panel`} aria-labelledby={`${id}-${value}`} tabIndex={0}>
        {children}
      </div>
    </div>
  );
}
