const dateTime = new Intl.DateTimeFormat('en-GB', {
  day: 'numeric',
  month: 'short',
  year: 'numeric',
  hour: '2-digit',
  minute: '2-digit',
});
const date = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', year: 'numeric' });

/** "3 Mar 2026, 14:05", in the person's own time zone. */
export const formatDateTime = (iso: string): string => dateTime.format(new Date(iso));

/** "3 Mar 2026" */
export const formatDate = (iso: string): string => date.format(new Date(iso));
