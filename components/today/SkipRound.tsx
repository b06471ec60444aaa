import { useState, type ReactElement } from 'react';
import { errorMessage } from '@/components/data/apiError';
import { keys } from '@/components/data/keys';
import { useWrite } from '@/components/data/useApi';
import { Button } from '@/components/ui/Button';
import { Dialog } from '@/components/ui/Dialog';
import { Notice } from '@/components/ui/Notice';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';
import { showToast } from '@/components/ui/Toast';
import { skipCauses, type SkipCause, type TodayResponse } from '@/shared/contracts/rounds';
import type { YardResponse } from '@/shared/contracts/yards';
import { skipWords } from '@/shared/skipWords';

/** Leaves a planned round out, with its cause; the plan is made anew at once. */
export function SkipRound({ yard, today, roundIndex }: { yard: YardResponse; today: TodayResponse; roundIndex: number }): ReactElement {
  const [open, setOpen] = useState(false);
  const skip = useWrite<{ done: true }, { cause: SkipCause }>(
    ({ cause }) => ({ method: 'POST', path: `/yards/${yard.id}/rounds/skip`, body: { on: today.today, roundIndex, cause } }),
    { stale: [keys.yard(yard.id)] },
  );
  const choose = (cause: SkipCause) => {
    skip.mutate({ cause }, {
      onSuccess: () => {
        setOpen(false);
        void showToast({ message: 'Left out. The plan is made anew.' });
      },
    });
  };
  return (
    <>
      <button type="button" className="t-hero-action" onClick={() => setOpen(true)}>Skip this round</button>
      <Dialog open={open} onClose={() => setOpen(false)} title="Why skip it?">
        <Stack gap={8}>
          <Text color="inkSoft">The cause stays in the yard’s history, and the plan looks for another time.</Text>
          {skipCauses.map((cause) => <Button key={cause} block label={skipWords[cause]} disabled={skip.isPending} onPress={() => choose(cause)} />)}
          {skip.error ? <Notice tone="problem">{errorMessage(skip.error)}</Notice> : null}
        </Stack>
      </Dialog>
    </>
  );
}
