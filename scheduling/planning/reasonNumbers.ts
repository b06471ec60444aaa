import type { Reason, ReasonCode } from './types';

/** A reason with its numbers cut to three decimals, so that a stored plan compares cleanly with the next one. */
export function reason(code: ReasonCode, values: Record<string, number | string> = {}): Reason {
  const cut: Record<string, number | string> = {};
  for (const [name, value] of Object.entries(values)) {
    cut[name] = typeof value === 'number' ? Math.round(value * 1000) / 1000 : value;
  }
  return { code, values: cut };
}
