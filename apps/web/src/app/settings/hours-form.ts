import {
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  Injector,
  input,
  linkedSignal,
  signal,
  untracked,
} from '@angular/core';
import { Apollo } from 'apollo-angular';
import { firstValueFrom } from 'rxjs';
import { SetHoursDocument, type SettingsQuery } from '../graphql/generated/graphql';
import { failureSentence } from '../ui/failure-sentence';
import { focusFirstProblem } from '../ui/focus-problem';
import { Icon } from '../ui/icon';
import { has, ProblemList } from '../ui/problem-list';
import { checkHours, onForm } from './check-hours';
import { nextBasis } from './basis';
import { addException, addSpan, removeException, removeSpan } from './hours-rows';
import { DAYS, hoursFields, hoursRows, readHours, type HoursRows } from './hours-draft';
import { SpanFields } from './span-fields';
import { isConflict, underRoot, type Told } from './told';

type Basis = Pick<SettingsQuery['shop'], 'version' | 'weekly' | 'exceptions'>;

/** The shop's weekly hours, and the dates on which they do not hold. */
@Component({
  selector: 'app-hours-form',
  imports: [Icon, ProblemList, SpanFields],
  templateUrl: './hours-form.html',
  styleUrl: './form-rows.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class HoursForm {
  private readonly apollo = inject(Apollo);
  private readonly injector = inject(Injector);

  readonly shop = input.required<Basis>();

  private readonly basis = linkedSignal<Basis, Basis>({
    source: () => this.shop(),
    computation: (newer, before) =>
      nextBasis(before?.value, newer, ({ weekly, exceptions }) => [weekly, exceptions]),
  });
  private readonly filling = signal(0);
  private added = 0;
  protected readonly rows = linkedSignal<number, HoursRows>({
    source: () => this.filling(),
    computation: (filling) =>
      hoursRows(
        untracked(() => this.basis()),
        filling,
      ),
  });
  protected readonly told = signal<Told<Basis>>({ problems: [] });
  protected readonly busy = signal(false);
  protected readonly days = DAYS;
  protected readonly has = has;
  protected readonly fields = computed(() => hoursFields(this.rows()));

  protected addSpan(owner: number | string): void {
    this.change((rows) => addSpan(rows, owner, this.newId()));
  }

  protected removeSpan(id: string): void {
    this.change((rows) => removeSpan(rows, id));
  }

  protected addException(): void {
    this.change((rows) => addException(rows, this.newId()));
  }

  protected removeException(id: string): void {
    this.change((rows) => removeException(rows, id));
  }

  /** Fills the form with what is saved now. */
  protected takeNewer(newer: Basis): void {
    this.basis.set(newer);
    this.filling.update((filling) => filling + 1);
    this.told.set({ problems: [] });
  }

  protected async save(event: Event): Promise<void> {
    event.preventDefault();
    if (this.busy()) return;
    const element = event.target as HTMLFormElement;
    const form = new FormData(element);
    const draft = readHours(this.rows(), (name) => String(form.get(name) ?? ''));
    const { weekly, exceptions } = draft;
    const problems = draft.problems.length > 0 ? draft.problems : checkHours(weekly, exceptions);
    this.told.set({ problems });
    if (problems.length > 0) {
      focusFirstProblem(element, this.injector);
      return;
    }
    this.busy.set(true);
    const variables = { version: this.basis().version, weekly, exceptions };
    try {
      const { data } = await firstValueFrom(
        this.apollo.mutate({ mutation: SetHoursDocument, variables }),
      );
      const answer = data?.setHours;
      if (answer?.shop && answer.problems.length === 0) {
        this.takeNewer(answer.shop);
        this.told.set({ problems: [], saved: true });
      } else {
        const refused = answer?.problems ?? [];
        const newer = isConflict(refused) ? (answer?.shop ?? null) : null;
        this.told.set({ problems: onForm(underRoot(refused, 'hours')), newer });
      }
    } catch (error) {
      this.told.set({ problems: [{ field: null, sentence: failureSentence(error) }] });
    } finally {
      focusFirstProblem(element, this.injector);
      this.busy.set(false);
    }
  }

  private change(edit: (rows: HoursRows) => HoursRows): void {
    this.rows.update(edit);
    this.told.set({ problems: [] });
  }

  private newId(): string {
    return `new-${(this.added += 1)}`;
  }
}
