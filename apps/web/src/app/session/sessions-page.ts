import { ChangeDetectionStrategy, Component } from '@angular/core';

@Component({
  selector: 'app-sessions-page',
  template: '<h1>Sessions</h1>',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SessionsPage {}
