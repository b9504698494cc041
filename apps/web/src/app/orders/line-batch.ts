import {
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  Injector,
  input,
  type OnInit,
  output,
  signal,
  viewChild,
} from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { Apollo } from 'apollo-angular';
import { firstValueFrom } from 'rxjs';
import { freshKey } from '../floor/fresh-key';
import { MakeBatchDocument, type OrderFieldsFragment } from '../graphql/generated/graphql';
import { ServerClock } from '../graphql/server-clock';
import { Session } from '../session/session';
import { failureSentence } from '../ui/failure-sentence';
import { FormDialog } from '../ui/form-dialog';
import { focusFirstProblem } from '../ui/focus-problem';
import { has, ProblemList, type FormProblem } from '../ui/problem-list';
import { localDate } from '../ui/when';
import { boardCount } from './order-words';

const MOST_BOARDS = 200;

/** Makes a batch for a line of an order: how many boards, and for when. */
@Component({
  selector: 'app-line-batch',
  imports: [FormDialog, ProblemList, ReactiveFormsModule],
  template: `
    <app-form-dialog heading="Make a batch" [dirty]="dirty" (closed)="closed.emit()">
      <form novalidate [formGroup]="form" (ngSubmit)="submit($event)">
        <p class="ct-quiet">
          {{ line().designName }}, of which the order wants {{ boardCount(line().count) }}. More may
          be made: what is over goes into stock.
        </p>
        <app-problem-list [problems]="problems()" [fields]="fields" />
        <div class="pair">
          <div class="ct-field">
            <label for="batch-boards">Boards</label>
            <input
              id="batch-boards"
              class="ct-input"
              type="number"
              inputmode="numeric"
              min="1"
              [max]="most"
              formControlName="boards"
              aria-describedby="batch-boards-problem"
              [attr.aria-invalid]="has(problems(), 'boards')"
            />
            <app-problem-list id="batch-boards-problem" [problems]="problems()" field="boards" />
          </div>
          <div class="ct-field">
            <label for="batch-due">Due</label>
            <input
              id="batch-due"
              class="ct-input"
              type="date"
              [min]="today()"
              formControlName="dueDate"
              aria-describedby="batch-due-problem"
              [attr.aria-invalid]="has(problems(), 'dueDate')"
            />
            <app-problem-list id="batch-due-problem" [problems]="problems()" field="dueDate" />
          </div>
        </div>
        <div class="buttons">
          <button type="submit" class="ct-button primary" [attr.aria-disabled]="busy()">
            {{ busy() ? 'Making …' : 'Make the batch' }}
          </button>
        </div>
      </form>
    </app-form-dialog>
  `,
  styleUrl: './order-form.scss',
  styles: `
    p {
      margin: 0;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class LineBatch implements OnInit {
  private readonly apollo = inject(Apollo);
  private readonly injector = inject(Injector);
  private readonly clock = inject(ServerClock);
  private readonly session = inject(Session);
  private readonly dialog = viewChild.required(FormDialog);
  /** However often the button is pressed or the line breaks: one batch. A changed form is another batch. */
  private attempt: { readonly of: string; readonly key: string } | null = null;

  readonly line = input.required<OrderFieldsFragment['lines'][number]>();
  readonly dueDate = input.required<string>();
  /** The new batch's code. */
  readonly made = output<string>();
  readonly closed = output();

  private readonly builder = inject(NonNullableFormBuilder);
  protected readonly form = this.builder.group({
    boards: this.builder.control<number | null>(null),
    dueDate: '',
  });
  protected readonly today = computed(() => localDate(this.clock.minute(), this.session.zone()));
  protected readonly problems = signal<readonly FormProblem[]>([]);
  protected readonly busy = signal(false);
  protected readonly fields = ['boards', 'dueDate'];
  protected readonly most = MOST_BOARDS;
  protected readonly has = has;
  protected readonly boardCount = boardCount;
  protected readonly dirty = (): boolean => this.form.dirty;

  ngOnInit(): void {
    const boards = Math.min(MOST_BOARDS, this.line().count);
    this.form.reset({ boards, dueDate: this.dueDate() });
  }

  protected async submit(event: Event): Promise<void> {
    const form = event.target as HTMLFormElement;
    await this.make();
    if (this.problems().length > 0) focusFirstProblem(form, this.injector);
  }

  private async make(): Promise<void> {
    if (this.busy()) return;
    const { boards, dueDate } = this.form.getRawValue();
    if (boards === null || !Number.isInteger(boards) || boards < 1 || boards > MOST_BOARDS) {
      const sentence = `A batch has 1 to ${MOST_BOARDS} boards.`;
      this.problems.set([{ field: 'boards', sentence }]);
      return;
    }
    if (dueDate === '') {
      this.problems.set([{ field: 'dueDate', sentence: 'Choose the day it is due.' }]);
      return;
    }
    const { id, designId } = this.line();
    const wanted = { designId, boards, dueDate, orderLineIds: [id] };
    const of = JSON.stringify(wanted);
    if (this.attempt?.of !== of) this.attempt = { of, key: freshKey() };
    this.busy.set(true);
    try {
      const input = { ...wanted, idempotencyKey: this.attempt.key };
      const { data } = await firstValueFrom(
        this.apollo.mutate({ mutation: MakeBatchDocument, variables: { input } }),
      );
      const answer = data?.createBatch;
      if (answer?.batch) {
        this.made.emit(answer.batch.code);
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
}
