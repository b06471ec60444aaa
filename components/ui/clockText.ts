/** Minutes after midnight [min] as 'HH:MM' for a time input; 1440 (the end of the day) reads '00:00'. */
export function toClockText(minutes: number): string {
  const inDay = ((Math.round(minutes) % 1440) + 1440) % 1440;
  return `${String(Math.floor(inDay / 60)).padStart(2, '0')}:${String(inDay % 60).padStart(2, '0')}`;
}

/** Minutes after midnight [min] from what a time input gives ('HH:MM' or 'HH:MM:SS'); null when it is empty or half filled. */
export function fromClockText(text: string): number | null {
  const parts = /^([01]\d|2[0-3]):([0-5]\d)(:[0-5]\d)?$/.exec(text);
  return parts ? Number(parts[1]) * 60 + Number(parts[2]) : null;
}
