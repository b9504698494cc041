import { ChangeDetectionStrategy, Component } from '@angular/core';

@Component({
  selector: 'app-forbidden-page',
  template: '<h1>Not for you</h1>',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ForbiddenPage {}
