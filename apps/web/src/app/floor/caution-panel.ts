import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import type { CautionCode } from '#shared/route/route';
import { CAUTION_ENDING, cautionLine } from '#shared/words/caution-words';
import { FloorPanels } from './floor-panels';
import { PanelFrame } from './panel-frame';

/** A caution in full, with whose word comes before ours. */
@Component({
  selector: 'app-caution-panel',
  imports: [PanelFrame],
  template: `
    <app-panel-frame #frame heading="Caution" (closed)="panels.close()">
      <p class="line">{{ line() }}</p>
      <p>{{ ending }}</p>
      <button type="button" class="ct-button primary" (click)="frame.close()">Understood</button>
    </app-panel-frame>
  `,
  styles: `
    .line {
      margin: 0;
      padding: 12px;
      border: 1px solid var(--ct-resin-line);
      border-radius: 10px;
      background: var(--ct-resin-wash);
      color: var(--ct-resin-ink);
      font-weight: 600;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class CautionPanel {
  protected readonly panels = inject(FloorPanels);
  readonly code = input.required<CautionCode>();
  protected readonly line = computed(() => cautionLine(this.code()));
  protected readonly ending = CAUTION_ENDING;
}
