import { useQueryClient } from '@tanstack/react-query';
import { useLayoutEffect } from 'react';
import type { ClockResponse, JumpClockResponse } from '@/shared/contracts/demonstration';
import { keys } from './keys';
import { noteServerNow } from './now';
import { useRead, useWrite } from './useApi';

/** The server's clock; keeps the screens' own count in step with it. */
export function useClock() {
  const clock = useRead<ClockResponse>(keys.clock, '/clock', { anonymous: true, everyMs: 60_000 });
  const now = clock.data?.now;
  // Before the first paint with it: the device's own time never shows.
  useLayoutEffect(() => {
    if (now !== undefined) {
      noteServerNow(now);
    }
  }, [now]);
  return clock;
}

/** Moves the demonstration's time; all that is due in between happens first. */
export function useJumpClock() {
  const client = useQueryClient();
  return useWrite<JumpClockResponse, { to: 'hour' | 'day' | 'next_event' }>(
    (body) => ({ method: 'POST', path: '/demo/clock/jump', body }),
    {
      onDone: (answer) => {
        noteServerNow(answer.now);
        client.setQueryData(keys.clock, { now: answer.now, isDemonstration: answer.isDemonstration, timeZone: answer.timeZone });
        void client.invalidateQueries();
      },
    },
  );
}
