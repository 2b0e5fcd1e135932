/** Minutes after midnight of `HH:MM` or `H:MM`; null when it isn't a time. */
export function minutesOf(clock: string): number | null {
  const match = /^(\d{1,2}):(\d{2})$/.exec(clock.trim());
  const [hours, minutes] = [Number(match?.[1]), Number(match?.[2])];
  return match && hours < 24 && minutes < 60 ? hours * 60 + minutes : null;
}
