import { ChangeDetectionStrategy, Component, input, output } from '@angular/core';
import { Icon } from '../ui/icon';
import { has, ProblemList, type FormProblem } from '../ui/problem-list';
import type { SpanRow } from './hours-draft';

/** The working spans of one day: two times each, one more, one less. */
@Component({
  selector: 'app-span-fields',
  imports: [Icon, ProblemList],
  template: `
    @for (span of spans(); track span.id; let index = $index) {
      @let at = path() + '.' + index;
      <div class="span">
        <input
          class="ct-input"
          inputmode="numeric"
          maxlength="6"
          autocomplete="off"
          placeholder="00:00"
          [name]="'from-' + span.id"
          [attr.value]="span.from"
          [attr.aria-label]="day() + ', span ' + (index + 1) + ', from'"
          [attr.aria-describedby]="'problem-' + span.id"
          [attr.aria-invalid]="has(problems(), at + '.fromMinute') || has(problems(), at)"
        />
        <span aria-hidden="true">to</span>
        <input
          class="ct-input"
          inputmode="numeric"
          maxlength="6"
          autocomplete="off"
          placeholder="00:00"
          [name]="'to-' + span.id"
          [attr.value]="span.to"
          [attr.aria-label]="day() + ', span ' + (index + 1) + ', to'"
          [attr.aria-describedby]="'problem-' + span.id"
          [attr.aria-invalid]="has(problems(), at + '.toMinute') || has(problems(), at)"
        />
        <button
          type="button"
          class="ct-button bare"
          [attr.aria-label]="'Remove span ' + (index + 1) + ' of ' + day()"
          (click)="remove.emit(span.id)"
        >
          <app-icon name="close" />
        </button>
      </div>
      <div class="problems" [id]="'problem-' + span.id">
        <app-problem-list [problems]="problems()" [field]="at" />
        <app-problem-list [problems]="problems()" [field]="at + '.fromMinute'" />
        <app-problem-list [problems]="problems()" [field]="at + '.toMinute'" />
      </div>
    } @empty {
      <span class="ct-quiet">closed</span>
    }
    <button
      type="button"
      class="ct-button bare"
      [attr.aria-label]="'Add a span to ' + day()"
      (click)="add.emit()"
    >
      <app-icon name="plus" /> Span
    </button>
    <app-problem-list class="problems" [problems]="problems()" [field]="path()" />
  `,
  styles: `
    :host {
      display: flex;
      flex-wrap: wrap;
      align-items: center;
      gap: 4px 12px;
    }
    .span {
      display: flex;
      align-items: center;
      gap: 6px;
    }
    .ct-input {
      width: 80px;
      text-align: center;
    }
    .problems:not(:has(p)) {
      display: none;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SpanFields {
  readonly spans = input.required<readonly SpanRow[]>();
  /** The day's name, for those who do not see the row. */
  readonly day = input.required<string>();
  /** Where the spans stand in the form, such as `weekly.0`. */
  readonly path = input.required<string>();
  readonly problems = input.required<readonly FormProblem[]>();
  readonly add = output();
  readonly remove = output<string>();

  protected readonly has = has;
}
