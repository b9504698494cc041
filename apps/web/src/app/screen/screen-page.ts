import { ChangeDetectionStrategy, Component } from '@angular/core';

@Component({
  selector: 'app-screen-page',
  template: '<h1>Shop screen</h1>',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ScreenPage {}
