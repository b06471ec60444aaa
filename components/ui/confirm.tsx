import { useSyncExternalStore, type ReactElement } from 'react';
import { Button } from '@/components/ui/Button';
import { Dialog } from '@/components/ui/Dialog';
import { Text } from '@/components/ui/Text';

export interface Question {
  /** The question: "Remove this zone?" */
  title: string;
  /** What follows from yes. */
  body: string;
  /** A verb: "Remove the zone". */
  confirmLabel: string;
  /** Default "Keep it as it is". */
  cancelLabel?: string;
  /** `danger` when something ends or is removed. */
  tone?: 'usual' | 'danger';
}

interface Asked extends Question {
  answer: (yes: boolean) => void;
}

let asked: Asked | null = null;
const listeners = new Set<() => void>();

function set(next: Asked | null): void {
  asked = next;
  listeners.forEach((changed) => changed());
}

/** Asks a question in front of the screen; true when the person says yes. A question still open is answered with no. */
export function confirm(question: Question): Promise<boolean> {
  asked?.answer(false);
  return new Promise((resolve) => {
    set({ ...question, answer: resolve });
  });
}

/** Shows what `confirm` asks. Stands once, in the root layout. */
export function ConfirmHost(): ReactElement | null {
  const question = useSyncExternalStore(
    (changed) => {
      listeners.add(changed);
      return () => listeners.delete(changed);
    },
    () => asked,
    () => null,
  );
  if (!question) return null;
  const answer = (yes: boolean) => (): void => {
    set(null);
    question.answer(yes);
  };
  return (
    <Dialog
      open
      kind="alert"
      title={question.title}
      onClose={answer(false)}
      actions={
        <>
          <Button kind={question.tone === 'danger' ? 'danger' : 'hose'} label={question.confirmLabel} onPress={answer(true)} />
          <Button label={question.cancelLabel ?? 'Keep it as it is'} onPress={answer(false)} />
        </>
      }
    >
      <Text>{question.body}</Text>
    </Dialog>
  );
}
