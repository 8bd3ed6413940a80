const DAY = { day: 'numeric', month: 'short', year: 'numeric' } as const;
const TIME = { hour: '2-digit', minute: '2-digit' } as const;

const dateTime = new Intl.DateTimeFormat('en-GB', { ...DAY, ...TIME });
const date = new Intl.DateTimeFormat('en-GB', DAY);
const day = new Intl.DateTimeFormat('en-GB', { weekday: 'long', ...DAY, month: 'long' });
const time = new Intl.DateTimeFormat('en-GB', TIME);

/** "3 Mar 2026, 14:05", in the person's own time zone, as all of these. */
export const formatDateTime = (iso: string): string => dateTime.format(new Date(iso));

/** "3 Mar 2026" */
export const formatDate = (iso: string): string => date.format(new Date(iso));

/** "Tuesday 3 March 2026" */
export const formatDay = (iso: string): string => day.format(new Date(iso));

/** "14:05" */
export const formatTime = (iso: string): string => time.format(new Date(iso));
