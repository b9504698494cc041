import { ChangeDetectionStrategy, Component } from '@angular/core';

@Component({
  selector: 'app-order-page',
  template: '<h1>Order</h1>',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class OrderPage {}
