/** Roles as the shop gives them; one person may have several. */
export const ROLES = ['OWNER', 'MAKER', 'HELPER', 'OFFICE', 'INTEGRATOR'] as const;
export type Role = (typeof ROLES)[number];

export type Permission =
  | 'manageShop'
  | 'manageMembers'
  | 'manageApi'
  | 'pairScreens'
  | 'seeFloor'
  | 'makeBatches'
  | 'moveBatches'
  | 'overrideHolds'
  | 'undoOthers'
  | 'backdateFreely'
  | 'seeOrders'
  | 'editOrders'
  | 'seeCustomers'
  | 'seePlan'
  | 'editDesigns';

/** Which roles hold which permission, as the shop's rules have it. Server and client ask the same table. */
const HOLDERS: Record<Permission, readonly Role[]> = {
  manageShop: ['OWNER'],
  manageMembers: ['OWNER'],
  manageApi: ['OWNER', 'INTEGRATOR'],
  pairScreens: ['OWNER'],
  seeFloor: ['OWNER', 'MAKER', 'HELPER'],
  makeBatches: ['OWNER', 'MAKER'],
  moveBatches: ['OWNER', 'MAKER', 'HELPER'],
  overrideHolds: ['OWNER', 'MAKER'],
  undoOthers: ['OWNER', 'MAKER'],
  backdateFreely: ['OWNER', 'MAKER'],
  seeOrders: ['OWNER', 'MAKER', 'OFFICE'],
  editOrders: ['OWNER', 'OFFICE'],
  seeCustomers: ['OWNER', 'OFFICE', 'MAKER'],
  seePlan: ['OWNER', 'MAKER', 'OFFICE'],
  editDesigns: ['OWNER', 'MAKER'],
};

/** Whether someone with these roles holds the permission. */
export function may(roles: readonly Role[], permission: Permission): boolean {
  return HOLDERS[permission].some((role) => roles.includes(role));
}
