import { useState, type ReactElement } from 'react';
import { Button } from '@/components/ui/Button';
import { Dialog } from '@/components/ui/Dialog';
import { Stack } from '@/components/ui/Stack';
import { skipCauses, type SkipCause } from '@/shared/contracts/rounds';
import { skipWords } from '@/shared/skipWords';

/** Leaves the next set out, with its cause. */
export function SkipNext({ title, pending, onSkip }: { title: string; pending: boolean; onSkip: (cause: SkipCause) => void }): ReactElement {
  const [open, setOpen] = useState(false);
  return (
    <>
      <Button kind="plain" label="Skip the next set" pending={pending} onPress={() => setOpen(true)} />
      <Dialog open={open} onClose={() => setOpen(false)} title={`Why skip ${title}?`}>
        <Stack gap={8}>
          {skipCauses.map((cause) => (
            <Button key={cause} block label={skipWords[cause]} onPress={() => {
              setOpen(false);
              onSkip(cause);
            }} />
          ))}
        </Stack>
      </Dialog>
    </>
  );
}
