/** A time in seconds in hours and minutes, as a workshop says it: 2 h 05 min, 48 min. */
export function sayDuration(seconds: number): string {
  const minutes = Math.max(1, Math.round(seconds / 60));
  const [hours, rest] = [Math.floor(minutes / 60), minutes % 60];
  return hours === 0 ? `${rest} min` : `${hours} h ${String(rest).padStart(2, '0')} min`;
}
