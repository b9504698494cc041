import { ChangeDetectionStrategy, Component } from '@angular/core';

@Component({
  selector: 'app-floor-page',
  template: '<h1>Floor</h1>',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FloorPage {}
