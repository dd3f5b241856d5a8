const day = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'long', year: 'numeric' })
const minute = new Intl.DateTimeFormat('en-GB', {
  day: 'numeric',
  month: 'long',
  year: 'numeric',
  hour: '2-digit',
  minute: '2-digit',
})

/** A day: 12 June 2026. */
export const formatDay = (timestamp: string): string => day.format(new Date(timestamp))

/** A day and a time: 12 June 2026 at 14:32. */
export const formatMinute = (timestamp: string): string => minute.format(new Date(timestamp))
