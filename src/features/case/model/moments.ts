const TIME = new Intl.DateTimeFormat('en-GB', { hour: '2-digit', minute: '2-digit' });
const DAY = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', year: 'numeric' });

/** `14:02` today, `3 May 2026, 14:02` otherwise. */
export function momentText(iso: string, now: Date = new Date()): string {
  const moment = new Date(iso);
  const time = TIME.format(moment);
  return DAY.format(moment) === DAY.format(now) ? time : `${DAY.format(moment)}, ${time}`;
}
