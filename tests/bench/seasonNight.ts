import { seasonPlanner } from './seasonPlanner';
import { referenceYard } from './referenceYard';

/** What one process planned in a night. */
export interface NightWork {
  yards: number;
  /** Time on the clock, and time of the processor, which other work on the machine disturbs less [ms]. */
  wallMs: number;
  cpuMs: number;
  sets: number;
  /** Memory in use after cleaning up, after the first tenth of the yards and at the end [MB]. */
  earlyHeapMb: number;
  endHeapMb: number;
  peakRssMb: number;
}

const MB = 1_048_576;

function cleanHeapMb(): number {
  globalThis.gc?.();
  return process.memoryUsage().heapUsed / MB;
}

/** Plans so many yards one after the other as a worker does: makes the input, plans, writes the result down as text. */
export function planNight(firstVariant: number, yards: number): NightWork {
  let sets = 0;
  let peakRssMb = 0;
  let earlyHeapMb = 0;
  let pausedMs = 0;
  const from = performance.now();
  const cpuBefore = process.cpuUsage();
  for (let done = 0; done < yards; done += 1) {
    const text = JSON.stringify(seasonPlanner.plan(referenceYard(firstVariant + done)));
    sets += text.split('"positionId"').length - 1;
    if (done % 50 === 0) peakRssMb = Math.max(peakRssMb, process.memoryUsage().rss / MB);
    if (done === Math.floor(yards / 10)) {
      const pause = performance.now();
      earlyHeapMb = cleanHeapMb();
      pausedMs += performance.now() - pause;
    }
  }
  const wallMs = performance.now() - from - pausedMs;
  const cpu = process.cpuUsage(cpuBefore);
  return { yards, wallMs, cpuMs: (cpu.user + cpu.system) / 1000, sets, earlyHeapMb, endHeapMb: cleanHeapMb(), peakRssMb };
}

/** Time of one plan after warming up [ms]. */
export function planMs(): number {
  for (let variant = 0; variant < 60; variant += 1) seasonPlanner.plan(referenceYard(variant));
  const from = performance.now();
  for (let variant = 60; variant < 120; variant += 1) seasonPlanner.plan(referenceYard(variant));
  return (performance.now() - from) / 60;
}
