import { ChangeDetectionStrategy, Component } from '@angular/core';

@Component({
  selector: 'app-settings-page',
  template: '<h1>Settings</h1>',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SettingsPage {}
