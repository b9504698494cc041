import { ChangeDetectionStrategy, Component } from '@angular/core';

@Component({
  selector: 'app-designs-page',
  template: '<h1>Designs</h1>',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class DesignsPage {}
