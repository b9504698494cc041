import { ChangeDetectionStrategy, Component } from '@angular/core';

@Component({
  selector: 'app-orders-page',
  template: '<h1>Orders</h1>',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class OrdersPage {}
