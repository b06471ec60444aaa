// Lines that show what is being done and how long it took; on a terminal the running step ticks in place.

const started = performance.now();
let stream = process.stdout;

/** Sends progress to standard error, for commands whose standard output is data. */
export function progressOnErrors() {
  stream = process.stderr;
}

/** A duration for people. @param {number} milliseconds [ms] */
export function duration(milliseconds) {
  const seconds = milliseconds / 1000;
  return seconds < 60 ? `${seconds.toFixed(1)} s` : `${Math.floor(seconds / 60)} min ${Math.round(seconds % 60)} s`;
}

/** Time since this process started its work [ms]. */
export const elapsedMs = () => performance.now() - started;

export function say(line = '') {
  // A terminal may show a ticking step on this line.
  stream.write(`${stream.isTTY ? '\r\u001b[K' : ''}${line}\n`);
}

/**
 * Runs one step and reports it: a line when it is done, and signs of life while it lasts.
 * @template T
 * @param {string} title what is being done, in words
 * @param {(note: (text: string, ok?: boolean) => void) => Promise<T>} work gets a function that adds a remark to the finished line, and may mark it as failed
 * @returns {Promise<T>}
 */
export async function step(title, work) {
  const from = performance.now();
  const isTerminal = stream.isTTY === true;
  let remark = '';
  let mark = '✓';
  const since = () => duration(performance.now() - from);
  const timer = setInterval(() => {
    if (isTerminal) stream.write(`\r\u001b[K  … ${title} (${since()})`);
    else if (performance.now() - from > 9_000) say(`  … ${title}, still working (${since()})`);
  }, isTerminal ? 250 : 10_000);
  timer.unref();
  const finish = () => {
    clearInterval(timer);
    say(`  ${mark} ${title}${remark ? `: ${remark}` : ''} (${since()})`);
  };
  try {
    const result = await work((text, ok = true) => { remark = text; if (!ok) mark = '✗'; });
    finish();
    return result;
  } catch (error) {
    mark = '✗';
    finish();
    throw error;
  }
}
