import type { InferSelectModel } from 'drizzle-orm';
import type { member } from '#drizzle/tables/member';
import type { Member } from '#server/generated/schema';
import { globalId } from '#server/http/global-id';
import { presentWeekly } from '#server/shop/present-hours';

/** A member as the API shows one. */
export function presentMember(row: InferSelectModel<typeof member>): Member {
  return {
    id: globalId('member', row.id),
    name: row.name,
    initials: row.initials,
    roles: row.roles,
    skills: row.skills,
    weekly: row.weekly && presentWeekly(row.weekly),
  };
}
