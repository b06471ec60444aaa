import { useEffect, useState } from 'react';
import { deviceNowMs } from '@/components/data/now';
import { readDraft, writeDraft } from '@/components/data/sessionDraft';
import { z } from '@/shared/zod';

const runSchema = z.object({ startedMs: z.number(), stoppedMs: z.number().nullable() });
type Run = z.infer<typeof runSchema>;

export interface RunTimer {
  state: 'idle' | 'running' | 'stopped';
  /** Since the water came on [s]. */
  seconds: number;
  start: () => void;
  /** Stops and gives the minutes the water ran [min], to a tenth. */
  stop: () => number;
  /** Takes a stop back: the time since the start counts on. */
  goOn: () => void;
  clear: () => void;
}

/** Times a run of water. The start is kept in this tab, so that a reload or a locked phone does not stop it. */
export function useRunTimer(storageKey: string): RunTimer {
  const [run, setRun] = useState<Run | null>(() => readDraft(storageKey, runSchema));
  const [nowMs, setNowMs] = useState(deviceNowMs);
  const isRunning = run !== null && run.stoppedMs === null;
  useEffect(() => {
    if (!isRunning) {
      return undefined;
    }
    const timer = setInterval(() => setNowMs(deviceNowMs()), 500);
    return () => clearInterval(timer);
  }, [isRunning]);
  const change = (next: Run | null) => {
    writeDraft(storageKey, next);
    setNowMs(deviceNowMs());
    setRun(next);
  };
  return {
    state: run === null ? 'idle' : isRunning ? 'running' : 'stopped',
    seconds: run === null ? 0 : Math.max(0, ((run.stoppedMs ?? nowMs) - run.startedMs) / 1000),
    start: () => change({ startedMs: deviceNowMs(), stoppedMs: null }),
    stop: () => {
      const stoppedMs = deviceNowMs();
      const startedMs = run?.startedMs ?? stoppedMs;
      change({ startedMs, stoppedMs });
      return Math.max(0.1, Math.round((stoppedMs - startedMs) / 6_000) / 10);
    },
    goOn: () => {
      if (run !== null) change({ ...run, stoppedMs: null });
    },
    clear: () => change(null),
  };
}

/** '12:40', or '1:05:09' from an hour on. */
export function timerText(seconds: number): string {
  const whole = Math.floor(seconds);
  const pad = (value: number) => String(value).padStart(2, '0');
  const hours = Math.floor(whole / 3600);
  const minutes = Math.floor((whole % 3600) / 60);
  return hours > 0 ? `${hours}:${pad(minutes)}:${pad(whole % 60)}` : `${minutes}:${pad(whole % 60)}`;
}
