import type { Permission } from '#shared/members/permissions';
import type { IconName } from '../ui/icon-paths';

export interface Page {
  readonly path: string;
  readonly name: string;
  readonly icon: IconName;
  /** What one must be allowed to see it; null for everybody. */
  readonly needs: Permission | null;
}

/** The pages of the bar, in order. */
export const PAGES: readonly Page[] = [
  { path: '/floor', name: 'Floor', icon: 'floor', needs: 'seeFloor' },
  { path: '/orders', name: 'Orders', icon: 'orders', needs: 'seeOrders' },
  { path: '/designs', name: 'Designs', icon: 'designs', needs: null },
  { path: '/api', name: 'API', icon: 'api', needs: 'manageApi' },
  { path: '/settings', name: 'Settings', icon: 'settings', needs: 'manageShop' },
];
