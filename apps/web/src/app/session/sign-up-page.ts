import { ChangeDetectionStrategy, Component } from '@angular/core';

@Component({
  selector: 'app-sign-up-page',
  template: '<h1>Sign up</h1>',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SignUpPage {}
