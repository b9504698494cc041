import { ChangeDetectionStrategy, Component } from '@angular/core';

@Component({
  selector: 'app-screens-page',
  template: '<h1>Screens</h1>',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ScreensPage {}
