import { useEffect, useState } from 'react';

// The demonstration's clock stands elsewhere than the device's, and device clocks are often wrong:
// screens count from the server's time, kept as a distance from the device's.
let offsetMs = 0;
const listeners = new Set<() => void>();

/** Takes the server's instant from an answer that carries one. */
export function noteServerNow(instant: string): void {
  offsetMs = Date.parse(instant) - Date.now();
  listeners.forEach((renew) => renew());
}

/** The server's time as well as this device knows it. */
export function serverNow(): Date {
  return new Date(Date.now() + offsetMs);
}

/** This device's own time [ms since 1970]: for lengths of time that run on the lawn while the server's clock may be moved. */
export function deviceNowMs(): number {
  return Date.now();
}

/**
 * The server's time, renewed while the screen is up.
 * @param everyMs - how often to renew [ms]
 */
export function useServerNow(everyMs = 1000): Date {
  const [now, setNow] = useState(serverNow);
  useEffect(() => {
    const renew = () => setNow(serverNow());
    const timer = setInterval(renew, everyMs);
    listeners.add(renew);
    return () => {
      clearInterval(timer);
      listeners.delete(renew);
    };
  }, [everyMs]);
  return now;
}
