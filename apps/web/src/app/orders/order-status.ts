import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { OrderStatus } from '../graphql/generated/graphql';
import { statusMeaning, statusName } from './order-words';

/** Where an order stands: a word, and a shape that fills up as the order goes on. */
@Component({
  selector: 'app-order-status',
  template: `
    <svg viewBox="0 0 12 12" aria-hidden="true" focusable="false">
      <path [attr.d]="shape().line" class="line" />
      <path [attr.d]="shape().fill" class="fill" />
    </svg>
    {{ name() }}
  `,
  host: { '[class]': 'status()', '[attr.title]': 'meaning()' },
  styles: `
    :host {
      display: inline-flex;
      align-items: center;
      gap: 6px;
      font-weight: 650;
      white-space: nowrap;
    }
    svg {
      flex: none;
      width: 12px;
      height: 12px;
    }
    .line {
      fill: none;
      stroke: currentColor;
      stroke-width: 1.6;
      stroke-linejoin: round;
      stroke-linecap: round;
    }
    .fill {
      fill: currentColor;
    }
    :host(.RECEIVED),
    :host(.PLANNED) {
      color: var(--ct-quiet);
    }
    :host(.IN_WORK) {
      color: var(--ct-slate);
    }
    :host(.READY) {
      color: var(--ct-leaf);
    }
    :host(.SHIPPED) {
      color: var(--ct-ink);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class OrderStatusBadge {
  readonly status = input.required<OrderStatus>();
  protected readonly name = computed(() => statusName(this.status()));
  protected readonly meaning = computed(() => statusMeaning(this.status()));
  protected readonly shape = computed(() => shapeOf(this.status()));
}

const SQUARE = 'M1.5 1.5h9v9h-9z';

function shapeOf(status: OrderStatus): { line: string; fill: string } {
  switch (status) {
    case 'RECEIVED':
      return { line: SQUARE, fill: '' };
    case 'PLANNED':
      return { line: SQUARE, fill: 'M1.5 8h9v2.5h-9z' };
    case 'IN_WORK':
      return { line: SQUARE, fill: 'M1.5 5h9v5.500h-9z' };
    case 'READY':
      return { line: SQUARE, fill: SQUARE };
    case 'SHIPPED':
      return { line: 'M1 6h10M7 2l4 4-4 4', fill: '' };
  }
}
