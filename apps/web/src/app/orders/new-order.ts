import {
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  Injector,
  output,
  signal,
  viewChild,
} from '@angular/core';
import {
  NonNullableFormBuilder,
  ReactiveFormsModule,
  type FormControl,
  type FormGroup,
} from '@angular/forms';
import { LONGEST_CUSTOMER_NAME, LONGEST_EMAIL, MOST_LINES } from '#shared/orders/order-schema';
import { Apollo } from 'apollo-angular';
import { firstValueFrom } from 'rxjs';
import { CreateOrderDocument, type OrderFieldsFragment } from '../graphql/generated/graphql';
import { ServerClock } from '../graphql/server-clock';
import { Session } from '../session/session';
import { failureSentence } from '../ui/failure-sentence';
import { FormDialog } from '../ui/form-dialog';
import { Icon } from '../ui/icon';
import { focusFirstProblem } from '../ui/focus-problem';
import { has, ProblemList, type FormProblem } from '../ui/problem-list';
import { Swatch } from '../ui/swatch';
import { localDate } from '../ui/when';
import { OrderDesigns } from './order-designs';
import { readOrder } from './order-draft';

type LineForm = FormGroup<{ designId: FormControl<string>; count: FormControl<number | null> }>;

/** A customer, a day, and what they want. */
@Component({
  selector: 'app-new-order',
  imports: [FormDialog, Icon, ProblemList, ReactiveFormsModule, Swatch],
  templateUrl: './new-order.html',
  styleUrl: './order-form.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class NewOrder {
  private readonly apollo = inject(Apollo);
  private readonly injector = inject(Injector);
  private readonly builder = inject(NonNullableFormBuilder);
  private readonly clock = inject(ServerClock);
  private readonly session = inject(Session);
  private readonly dialog = viewChild.required(FormDialog);
  protected readonly designs = inject(OrderDesigns);

  readonly made = output<OrderFieldsFragment>();
  readonly closed = output();

  protected readonly form = this.builder.group({
    customerName: '',
    customerEmail: '',
    dueDate: '',
    lines: this.builder.array<LineForm>([this.line()]),
  });
  protected readonly today = computed(() => localDate(this.clock.minute(), this.session.zone()));
  protected readonly problems = signal<readonly FormProblem[]>([]);
  protected readonly busy = signal(false);
  protected readonly has = has;
  protected readonly longestName = LONGEST_CUSTOMER_NAME;
  protected readonly longestEmail = LONGEST_EMAIL;
  protected readonly mostLines = MOST_LINES;
  protected readonly dirty = (): boolean => this.form.dirty;

  constructor() {
    if (this.designs.all() === null) void this.designs.read();
  }

  /** Fields with a place of their own on the form. */
  protected fields(): string[] {
    const lines = this.form.controls.lines.controls.flatMap((_line, index) => [
      `lines.${index}.designId`,
      `lines.${index}.count`,
    ]);
    return ['customerName', 'customerEmail', 'dueDate', 'lines', ...lines];
  }

  protected addLine(): void {
    this.form.controls.lines.push(this.line());
    this.problems.set([]);
  }

  protected removeLine(index: number): void {
    this.form.controls.lines.removeAt(index);
    this.form.markAsDirty();
    this.problems.set([]);
  }

  protected async submit(event: Event): Promise<void> {
    const form = event.target as HTMLFormElement;
    await this.enter();
    if (this.problems().length > 0) focusFirstProblem(form, this.injector);
  }

  private async enter(): Promise<void> {
    if (this.busy()) return;
    const { input, problems } = readOrder(this.form.getRawValue(), this.today());
    this.problems.set(problems);
    if (input === null) return;
    this.busy.set(true);
    try {
      const { data } = await firstValueFrom(
        this.apollo.mutate({ mutation: CreateOrderDocument, variables: { input } }),
      );
      const answer = data?.createOrder;
      if (answer?.order) {
        this.made.emit(answer.order);
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

  private line(): LineForm {
    return this.builder.group({
      designId: this.builder.control(''),
      count: this.builder.control<number | null>(null),
    });
  }
}
