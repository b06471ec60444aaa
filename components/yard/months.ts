/** The months of the civil year, index 0 is January. */
export const months: readonly { name: string; short: string }[] = [
  'January', 'February', 'March', 'April', 'May', 'June', 'July', 'August', 'September', 'October', 'November', 'December',
].map((name) => ({ name, short: name.slice(0, 3) }));
