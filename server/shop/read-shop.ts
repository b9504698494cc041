import { asc, desc } from 'drizzle-orm';
import type { NodePgDatabase } from 'drizzle-orm/node-postgres';
import { reading } from '#drizzle/tables/reading';
import { clampClass, profile, shop, station } from '#drizzle/tables/shop';
import type { Shop } from '#server/generated/schema';
import { globalId } from '#server/http/global-id';
import { presentException, presentWeekly } from './present-hours';

/** The shop as its people set it up, with the latest reading of its air. */
export async function readShop(tx: Pick<NodePgDatabase, 'select'>): Promise<Shop> {
  const [row] = await tx.select().from(shop);
  if (!row) throw new Error('The shop is gone.');
  const stations = await tx.select().from(station).orderBy(asc(station.position));
  const clamps = await tx.select().from(clampClass).orderBy(asc(clampClass.length));
  const profiles = await tx.select().from(profile).orderBy(asc(profile.kind), asc(profile.key));
  const [air] = await tx
    .select()
    .from(reading)
    .orderBy(desc(reading.at), desc(reading.id))
    .limit(1);
  return {
    id: globalId('shop', row.id),
    version: row.version,
    name: row.name,
    zone: row.zone,
    lengthUnit: row.lengthUnit,
    currency: row.currency,
    weekly: presentWeekly(row.weekly),
    exceptions: row.exceptions.map(presentException).sort((a, b) => (a.date < b.date ? -1 : 1)),
    stations: stations.map(({ key, name, unit, capacity }) => ({ key, name, unit, capacity })),
    clamps: clamps.map(({ key, length, count }) => ({ key, length: length.toString(), count })),
    profiles: profiles.map(({ figures: { key, kind, name, isDefault, note } }) => ({
      key,
      kind,
      name,
      isDefault,
      note,
    })),
    air: air
      ? {
          at: air.at.toISOString(),
          temperatureTenthsC: air.temperatureTenthsC,
          humidityPercent: air.humidityPercent,
        }
      : null,
    isDemo: row.demoMadeAt !== null,
  };
}
