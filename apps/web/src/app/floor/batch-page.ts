import { ChangeDetectionStrategy, Component } from '@angular/core';

@Component({
  selector: 'app-batch-page',
  template: '<h1>Batch</h1>',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class BatchPage {}
