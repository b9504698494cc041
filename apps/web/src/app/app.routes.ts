import type { Routes } from '@angular/router';
import { home, mayEnter, signedIn, signedOut } from './session/session-guard';

export const routes: Routes = [
  {
    path: 'sign-in',
    title: 'Sign in',
    canActivate: [signedOut],
    loadComponent: () => import('./session/sign-in-page').then((m) => m.SignInPage),
  },
  {
    path: 'sign-up',
    title: 'Make a shop',
    canActivate: [signedOut],
    loadComponent: () => import('./session/sign-up-page').then((m) => m.SignUpPage),
  },
  {
    path: 'screen',
    title: 'Shop screen',
    loadComponent: () => import('./screen/screen-page').then((m) => m.ScreenPage),
  },
  {
    path: '',
    canActivate: [signedIn],
    loadComponent: () => import('./shell/shell').then((m) => m.Shell),
    children: [
      { path: '', pathMatch: 'full', canActivate: [home], children: [] },
      {
        path: 'floor',
        title: 'Floor',
        canActivate: [mayEnter('seeFloor')],
        loadComponent: () => import('./floor/floor-page').then((m) => m.FloorPage),
      },
      {
        path: 'batch/:code',
        title: 'Batch',
        canActivate: [mayEnter('seeFloor')],
        loadComponent: () => import('./floor/batch-page').then((m) => m.BatchPage),
      },
      {
        path: 'orders',
        title: 'Orders',
        canActivate: [mayEnter('seeOrders')],
        loadComponent: () => import('./orders/orders-page').then((m) => m.OrdersPage),
      },
      {
        path: 'orders/:code',
        title: 'Order',
        canActivate: [mayEnter('seeOrders')],
        loadComponent: () => import('./orders/order-page').then((m) => m.OrderPage),
      },
      {
        path: 'designs',
        title: 'Designs',
        loadComponent: () => import('./designs/designs-page').then((m) => m.DesignsPage),
      },
      {
        path: 'api',
        title: 'API',
        canActivate: [mayEnter('manageApi')],
        loadComponent: () => import('./api/api-page').then((m) => m.ApiPage),
      },
      {
        path: 'settings',
        title: 'Settings',
        canActivate: [mayEnter('manageShop')],
        loadComponent: () => import('./settings/settings-page').then((m) => m.SettingsPage),
      },
      {
        path: 'settings/screens',
        title: 'Screens',
        canActivate: [mayEnter('pairScreens')],
        loadComponent: () => import('./screens/screens-page').then((m) => m.ScreensPage),
      },
      {
        path: 'sessions',
        title: 'Your sessions',
        loadComponent: () => import('./session/sessions-page').then((m) => m.SessionsPage),
      },
      {
        path: 'forbidden',
        title: 'Not for you',
        loadComponent: () => import('./shell/forbidden-page').then((m) => m.ForbiddenPage),
      },
      {
        path: '**',
        title: 'Not found',
        loadComponent: () => import('./shell/not-found-page').then((m) => m.NotFoundPage),
      },
    ],
  },
];
