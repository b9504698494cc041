import type { Role } from '#shared/members/permissions';

/** "maker, office" */
export function roleNames(roles: readonly Role[]): string {
  return roles.map(roleName).join(', ');
}

export function roleName(role: Role): string {
  switch (role) {
    case 'OWNER':
      return 'owner';
    case 'MAKER':
      return 'maker';
    case 'HELPER':
      return 'helper';
    case 'OFFICE':
      return 'office';
    case 'INTEGRATOR':
      return 'integrator';
  }
}
