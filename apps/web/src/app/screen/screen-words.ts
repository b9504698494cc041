import type { Instant } from '#shared/time/instant';

/** Minutes after which a reading of the air is too old to be shown as the shop's air. */
const AIR_FOR = 6 * 60;

/** "Tuesday 1 December" */
export function longDay(at: Instant, zone: string): string {
  const parts = new Intl.DateTimeFormat('en-GB', {
    timeZone: zone,
    weekday: 'long',
    day: 'numeric',
    month: 'long',
  }).formatToParts(at);
  const part = (type: string) => parts.find((each) => each.type === type)?.value ?? '';
  return `${part('weekday')} ${part('day')} ${part('month')}`;
}

/** "shop 18 °C, 46 %"; empty when there is no reading of the last hours. */
export function airWords(
  air: {
    readonly at: string;
    readonly temperatureTenthsC: number;
    readonly humidityPercent: number | null;
  } | null,
  now: Instant,
): string {
  if (air === null || now - Date.parse(air.at) > AIR_FOR * 60_000) return '';
  const degrees = `shop ${Math.round(air.temperatureTenthsC / 10)} °C`;
  return air.humidityPercent === null ? degrees : `${degrees}, ${air.humidityPercent} %`;
}
