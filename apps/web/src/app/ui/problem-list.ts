import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { Icon } from './icon';

/** As the API gives them; `field` is a dotted path, or null when it is about the whole command. */
export interface FormProblem {
  readonly field?: string | null;
  readonly sentence: string;
}

/**
 * What is wrong, in words, beside the field it is about. Without `field` it shows what is about the whole form.
 * Point the input at it: `aria-describedby` with this element's id, `aria-invalid` with `has(problems, field)`.
 */
@Component({
  selector: 'app-problem-list',
  imports: [Icon],
  template: `
    @for (problem of shown(); track $index) {
      <p><app-icon name="warning" />{{ problem.sentence }}</p>
    }
  `,
  host: { '[attr.role]': 'field() === null ? "alert" : null' },
  styles: `
    p {
      display: flex;
      align-items: flex-start;
      gap: 6px;
      margin: 0;
      color: var(--ct-madder);
      font-size: 0.875rem;
      font-weight: 600;
    }
    app-icon {
      margin-top: 0.05em;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ProblemList {
  readonly problems = input.required<readonly FormProblem[]>();
  readonly field = input<string | null>(null);
  /** Fields that have a place of their own; the others' problems are shown with those about the whole form. */
  readonly fields = input<readonly string[]>([]);

  protected readonly shown = computed(() => {
    const field = this.field();
    return this.problems().filter((problem) => {
      const about = fieldOf(problem);
      return field === null ? about === null || !this.fields().includes(about) : about === field;
    });
  });
}

/** Whether some problem is about the field. */
export function has(problems: readonly FormProblem[], field: string): boolean {
  return problems.some((problem) => fieldOf(problem) === field);
}

/** Commands that take one input object name its fields with `input.` before them. */
function fieldOf(problem: FormProblem): string | null {
  return problem.field?.replace(/^input\./, '') ?? null;
}
