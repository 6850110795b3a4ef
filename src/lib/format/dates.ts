/** Dates in words, always UTC so that a page reads the same everywhere. */

const MONTHS = [
  "January",
  "February",
  "March",
  "April",
  "May",
  "June",
  "July",
  "August",
  "September",
  "October",
  "November",
  "December",
] as const;

/** `2 October 2026` from a date or an ISO string; throws RangeError for what is no date. */
export function formatDate(date: Date | string): string {
  const moment = typeof date === "string" ? new Date(date) : date;
  if (Number.isNaN(moment.getTime())) throw new RangeError("formatDate was given something that is not a date.");
  return `${moment.getUTCDate()} ${MONTHS[moment.getUTCMonth()]} ${moment.getUTCFullYear()}`;
}
