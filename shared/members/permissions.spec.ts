import { describe, expect, it } from 'vitest';
import { may, ROLES, type Permission, type Role } from './permissions';

/** The table of roles, spelled out a second time on purpose: who may what, role by role. */
const EXPECTED: Record<Role, readonly Permission[]> = {
  OWNER: [
    ...(['manageShop', 'manageMembers', 'manageApi', 'pairScreens', 'seeFloor'] as const),
    ...(['makeBatches', 'moveBatches', 'overrideHolds', 'undoOthers'] as const),
    ...(['backdateFreely', 'seeOrders', 'editOrders', 'seeCustomers'] as const),
    ...(['seePlan', 'editDesigns'] as const),
  ],
  MAKER: [
    ...(['seeFloor', 'makeBatches', 'moveBatches', 'overrideHolds', 'undoOthers'] as const),
    ...(['backdateFreely', 'seeOrders', 'seeCustomers', 'seePlan', 'editDesigns'] as const),
  ],
  HELPER: ['seeFloor', 'moveBatches'],
  OFFICE: ['seeOrders', 'editOrders', 'seeCustomers', 'seePlan'],
  INTEGRATOR: ['manageApi'],
};

describe('may', () => {
  it.each(ROLES)('gives %s what the shop gives that role and nothing else', (role) => {
    for (const permission of EXPECTED.OWNER) {
      expect([permission, may([role], permission)]).toEqual([
        permission,
        EXPECTED[role].includes(permission),
      ]);
    }
  });

  it('adds up the roles of one person', () => {
    expect(may(['HELPER', 'OFFICE'], 'moveBatches')).toBe(true);
    expect(may(['HELPER', 'OFFICE'], 'editOrders')).toBe(true);
    expect(may(['HELPER', 'OFFICE'], 'overrideHolds')).toBe(false);
  });

  it('gives nothing to whoever has no role', () => {
    for (const permission of EXPECTED.OWNER) expect(may([], permission)).toBe(false);
  });
});
