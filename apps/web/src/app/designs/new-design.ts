import {
  afterNextRender,
  ChangeDetectionStrategy,
  Component,
  computed,
  type ElementRef,
  inject,
  Injector,
  input,
  output,
  signal,
  viewChild,
} from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import {
  NonNullableFormBuilder,
  ReactiveFormsModule,
  type FormControl,
  type FormGroup,
} from '@angular/forms';
import { LONGEST_DESIGN_NAME, MOST_STRIPS } from '#shared/designs/design-schema';
import { SPECIES, SPECIES_KEYS } from '#shared/designs/species';
import type { LengthUnit } from '#shared/length/length';
import { Apollo } from 'apollo-angular';
import { firstValueFrom, map, startWith } from 'rxjs';
import { CreateDesignDocument, type DesignFieldsFragment } from '../graphql/generated/graphql';
import { failureSentence } from '../ui/failure-sentence';
import { FormDialog } from '../ui/form-dialog';
import { Icon } from '../ui/icon';
import { focusFirstProblem } from '../ui/focus-problem';
import { has, ProblemList, type FormProblem } from '../ui/problem-list';
import { Swatch } from '../ui/swatch';
import { drawableStrips, readDesign, widthHint } from './design-draft';

type StripForm = FormGroup<{ species: FormControl<string>; width: FormControl<string> }>;

const LENGTHS = [
  { name: 'length', label: 'Length' },
  { name: 'width', label: 'Width' },
  { name: 'thickness', label: 'Thickness' },
] as const;
const COUNTS = [
  { name: 'slices', label: 'Slices of a board', most: 60 },
  { name: 'panelCount', label: 'Panels', most: 6 },
  { name: 'panelBoards', label: 'Boards from them', most: 24 },
  { name: 'blocksPerBoard', label: 'Blocks a board', most: 4 },
  { name: 'panelClampCount', label: 'Clamps a panel', most: 40 },
  { name: 'blockClampCount', label: 'Clamps a block', most: 40 },
] as const;

/** A new design, drawn while it is typed. */
@Component({
  selector: 'app-new-design',
  imports: [FormDialog, Icon, ProblemList, ReactiveFormsModule, Swatch],
  templateUrl: './new-design.html',
  styleUrl: './new-design.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class NewDesign {
  private readonly apollo = inject(Apollo);
  private readonly injector = inject(Injector);
  private readonly builder = inject(NonNullableFormBuilder);
  private readonly dialog = viewChild.required(FormDialog);
  private readonly stripList = viewChild.required<ElementRef<HTMLElement>>('stripList');

  readonly unit = input.required<LengthUnit>();
  readonly made = output<DesignFieldsFragment>();
  readonly closed = output();

  protected readonly form = this.builder.group({
    name: '',
    length: '',
    width: '',
    thickness: '',
    strips: this.builder.array<StripForm>([this.strip('maple'), this.strip('walnut')]),
    slices: this.builder.control<number | null>(10),
    panelCount: this.builder.control<number | null>(1),
    panelBoards: this.builder.control<number | null>(1),
    blocksPerBoard: this.builder.control<number | null>(1),
    panelClampCount: this.builder.control<number | null>(4),
    blockClampCount: this.builder.control<number | null>(4),
  });
  private readonly typed = toSignal(
    this.form.valueChanges.pipe(
      startWith(null),
      map(() => this.form.getRawValue()),
    ),
    { requireSync: true },
  );
  protected readonly preview = computed(() => {
    const { name, slices, strips } = this.typed();
    const drawn = drawableStrips(strips, this.unit());
    const count = Math.min(60, Math.max(1, Math.trunc(slices ?? 1)));
    return drawn.length === 0
      ? null
      : { id: 'new', name: name || 'the new design', slices: count, strips: drawn };
  });
  protected readonly hint = computed(() => widthHint(this.typed(), this.unit()));
  protected readonly problems = signal<readonly FormProblem[]>([]);
  protected readonly busy = signal(false);
  protected readonly has = has;
  protected readonly lengths = LENGTHS;
  protected readonly counts = COUNTS;
  protected readonly species = SPECIES_KEYS.map((key) => ({ key, name: SPECIES[key].name }));
  protected readonly longestName = LONGEST_DESIGN_NAME;
  protected readonly mostStrips = MOST_STRIPS;
  protected readonly dirty = (): boolean => this.form.dirty;

  protected get strips() {
    return this.form.controls.strips;
  }

  /** Fields with a place of their own on the form. */
  protected fields(): string[] {
    return [
      'name',
      ...LENGTHS.map((each) => each.name),
      ...COUNTS.map((each) => each.name),
      'strips',
      ...this.strips.controls.flatMap((_strip, index) => [
        `strips.${index}.species`,
        `strips.${index}.width`,
      ]),
    ];
  }

  /** Adds a strip like the last but one, as patterns mostly go on. */
  protected addStrip(): void {
    const like = this.strips.at(-2) ?? this.strips.at(-1);
    const { species, width } = like?.getRawValue() ?? { species: 'maple', width: '' };
    this.strips.push(this.strip(species, width));
    this.changed();
  }

  protected removeStrip(index: number): void {
    this.strips.removeAt(index);
    this.changed();
  }

  /** Moves a strip by one place, and the focus with it. */
  protected moveStrip(index: number, by: -1 | 1, button: HTMLElement): void {
    const strip = this.strips.at(index);
    this.strips.removeAt(index, { emitEvent: false });
    this.strips.insert(index + by, strip);
    this.changed();
    const same = `[data-move="${button.dataset['move'] ?? ''}"]`;
    afterNextRender(
      () => {
        const row = this.stripList().nativeElement.children[index + by];
        row?.querySelector<HTMLElement>(same)?.focus();
      },
      { injector: this.injector },
    );
  }

  protected async submit(event: Event): Promise<void> {
    const form = event.target as HTMLFormElement;
    await this.make();
    if (this.problems().length > 0) focusFirstProblem(form, this.injector);
  }

  private async make(): Promise<void> {
    if (this.busy()) return;
    const { input: wanted, problems } = readDesign(this.form.getRawValue(), this.unit());
    this.problems.set(problems);
    if (wanted === null) return;
    this.busy.set(true);
    try {
      const { data } = await firstValueFrom(
        this.apollo.mutate({ mutation: CreateDesignDocument, variables: { input: wanted } }),
      );
      const answer = data?.createDesign;
      if (answer?.design) {
        this.made.emit(answer.design);
        this.dialog().close();
      } else {
        this.problems.set(answer?.problems ?? []);
      }
    } catch (error) {
      this.problems.set([{ field: null, sentence: failureSentence(error) }]);
    } finally {
      this.busy.set(false);
    }
  }

  private changed(): void {
    this.form.markAsDirty();
    this.problems.set([]);
  }

  private strip(species: string, width = ''): StripForm {
    return this.builder.group({ species, width });
  }
}
