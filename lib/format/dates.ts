// Dates as a record writes them. Times are said in UTC until a person can choose a zone: the server and the browser must
// print the same text, and an audit line without a zone is worth little.

const day = new Intl.DateTimeFormat('en-GB', {
  day: 'numeric',
  month: 'short',
  year: 'numeric',
  timeZone: 'UTC',
});
const minute = new Intl.DateTimeFormat('en-GB', {
  day: 'numeric',
  month: 'short',
  year: 'numeric',
  hour: '2-digit',
  minute: '2-digit',
  hourCycle: 'h23',
  timeZone: 'UTC',
});

/** `3 May 2026`. */
export function formatDay(iso: string): string {
  return day.format(new Date(iso));
}

/** `3 May 2026, 14:05 UTC`. */
export function formatMoment(iso: string): string {
  return `${minute.format(new Date(iso))} UTC`;
}
