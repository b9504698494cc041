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
import { MOST_CLASSES } from '#shared/shop/clamps-schema';
import { Apollo } from 'apollo-angular';
import { firstValueFrom } from 'rxjs';
import { SetClampsDocument, type SettingsQuery } from '../graphql/generated/graphql';
import { failureSentence } from '../ui/failure-sentence';
import { focusFirstProblem } from '../ui/focus-problem';
import { Icon } from '../ui/icon';
import { has, ProblemList } from '../ui/problem-list';
import { nextBasis } from './basis';
import { clampRows, readClamps, type ClampRow } from './clamps-draft';
import { isConflict, underRoot, type Told } from './told';

type Basis = Pick<SettingsQuery['shop'], 'version' | 'lengthUnit' | 'clamps'>;
type Newer = Pick<Basis, 'version' | 'clamps'>;

/** The shop's clamps by length class. */
@Component({
  selector: 'app-clamps-form',
  imports: [Icon, ProblemList],
  templateUrl: './clamps-form.html',
  styleUrl: './form-rows.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ClampsForm {
  private readonly apollo = inject(Apollo);
  private readonly injector = inject(Injector);

  readonly shop = input.required<Basis>();

  private readonly basis = linkedSignal<Basis, Basis>({
    source: () => this.shop(),
    computation: (newer, before) => nextBasis(before?.value, newer, (shop) => shop.clamps),
  });
  private readonly filling = signal(0);
  private added = 0;
  protected readonly rows = linkedSignal<number, readonly ClampRow[]>({
    source: () => this.filling(),
    computation: (filling) => {
      const { clamps, lengthUnit } = untracked(() => this.basis());
      return clampRows(clamps, lengthUnit, filling);
    },
  });
  protected readonly told = signal<Told<Newer>>({ problems: [] });
  protected readonly busy = signal(false);
  protected readonly has = has;
  protected readonly full = computed(() => this.rows().length >= MOST_CLASSES);
  protected readonly fields = computed(() =>
    this.rows().flatMap((_row, index) => [`${index}.length`, `${index}.count`]),
  );

  protected add(): void {
    const id = `new-${(this.added += 1)}`;
    this.rows.update((rows) => [...rows, { id, key: null, stored: null, length: '', count: '' }]);
    this.told.set({ problems: [] });
  }

  protected remove(id: string): void {
    this.rows.update((rows) => rows.filter((row) => row.id !== id));
    this.told.set({ problems: [] });
  }

  /** Fills the form with what is saved now. */
  protected takeNewer(newer: Newer): void {
    this.basis.update((basis) => ({ ...basis, version: newer.version, clamps: newer.clamps }));
    this.filling.update((filling) => filling + 1);
    this.told.set({ problems: [] });
  }

  protected async save(event: Event): Promise<void> {
    event.preventDefault();
    if (this.busy()) return;
    const element = event.target as HTMLFormElement;
    const form = new FormData(element);
    const { version, lengthUnit } = this.basis();
    const { clamps, problems } = readClamps(this.rows(), lengthUnit, (name) =>
      String(form.get(name) ?? ''),
    );
    this.told.set({ problems });
    if (problems.length > 0) {
      focusFirstProblem(element, this.injector);
      return;
    }
    this.busy.set(true);
    try {
      const { data } = await firstValueFrom(
        this.apollo.mutate({ mutation: SetClampsDocument, variables: { version, clamps } }),
      );
      const answer = data?.setClamps;
      if (answer?.shop && answer.problems.length === 0) {
        this.takeNewer(answer.shop);
        this.told.set({ problems: [], saved: true });
      } else {
        const refused = answer?.problems ?? [];
        const newer = isConflict(refused) ? (answer?.shop ?? null) : null;
        this.told.set({ problems: underRoot(refused, 'clamps'), newer });
      }
    } catch (error) {
      this.told.set({ problems: [{ field: null, sentence: failureSentence(error) }] });
    } finally {
      focusFirstProblem(element, this.injector);
      this.busy.set(false);
    }
  }
}
