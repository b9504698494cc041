import { ChangeDetectionStrategy, Component } from '@angular/core';

@Component({
  selector: 'app-api-page',
  template: '<h1>API</h1>',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ApiPage {}
