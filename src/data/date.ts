const ISO = /^(\d{4})-(\d{2})-(\d{2})(?:[T ]00:00(?::00(?:\.0+)?)?Z?)?$/;
const DAYS_IN_MONTH = [31, 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31];

/**
 * An ISO date (YYYY-MM-DD, a day that exists in the Gregorian calendar) as days since 1970-01-01, else null. Midnight may follow, as programs
 * that know only points in time write it; a date with any other time of day is no date, since counting it as a day would drop the time.
 */
export function isoDay(cell: string): number | null {
  // Most cells are told apart without the expression.
  if (cell.length < 10 || cell.charCodeAt(4) !== 45 || cell.charCodeAt(7) !== 45) return null;
  const found = ISO.exec(cell);
  if (!found) return null;
  const [year, month, day] = [Number(found[1]), Number(found[2]), Number(found[3])];
  if (month < 1 || month > 12 || day < 1 || day > daysIn(year, month)) return null;
  // The year is taken to begin in March, so that the leap day is its last (days from 0000-03-01).
  const y = month > 2 ? year : year - 1;
  const fromMarch = Math.floor((153 * ((month + 9) % 12) + 2) / 5) + day - 1;
  return 365 * y + Math.floor(y / 4) - Math.floor(y / 100) + Math.floor(y / 400) + fromMarch - 719_468;
}

function daysIn(year: number, month: number): number {
  const leap = (year % 4 === 0 && year % 100 !== 0) || year % 400 === 0;
  return month === 2 && leap ? 29 : DAYS_IN_MONTH[month - 1];
}
