/** Weekdays as the server counts them (0 is Sunday), in the order in which people read a week. */
export const weekdays: readonly { day: number; name: string; short: string }[] = [
  { day: 1, name: 'Monday', short: 'Mon' }, { day: 2, name: 'Tuesday', short: 'Tue' }, { day: 3, name: 'Wednesday', short: 'Wed' }, { day: 4, name: 'Thursday', short: 'Thu' },
  { day: 5, name: 'Friday', short: 'Fri' }, { day: 6, name: 'Saturday', short: 'Sat' }, { day: 0, name: 'Sunday', short: 'Sun' },
];
