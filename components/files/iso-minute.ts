/** A time of a file as a table shows it: date, time and offset, since a change of the clock is what is looked at. */
export function isoMinute(iso: string, zone: string): string {
  const parts = new Map(
    new Intl.DateTimeFormat('en-GB', {
      timeZone: zone,
      ...{ year: 'numeric', month: '2-digit', day: '2-digit', hour: '2-digit', minute: '2-digit' },
      ...{ hourCycle: 'h23', timeZoneName: 'longOffset' },
    })
      .formatToParts(new Date(iso))
      .map((part) => [part.type, part.value]),
  );
  const offset = (parts.get('timeZoneName') ?? '').replace('GMT', '') || '+00:00';
  const date = (['year', 'month', 'day'] as const).map((type) => parts.get(type) ?? '');
  return `${date.join('-')} ${parts.get('hour') ?? ''}:${parts.get('minute') ?? ''} ${offset}`;
}
