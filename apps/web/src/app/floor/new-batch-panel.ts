import {
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  signal,
  viewChild,
} from '@angular/core';
import { RouterLink } from '@angular/router';
import { batchSchemaOn, MOST_BOARDS } from '#shared/batches/batch-schema';
import { Apollo } from 'apollo-angular';
import { firstValueFrom } from 'rxjs';
import { MakeBatchDocument, type CreateBatchInput } from '../graphql/generated/graphql';
import { failureSentence } from '../ui/failure-sentence';
import { has, ProblemList, type FormProblem } from '../ui/problem-list';
import { Swatch } from '../ui/swatch';
import { FloorBoard } from './floor-board';
import { FloorPanels } from './floor-panels';
import { FloorStore } from './floor-store';
import { freshKey } from './fresh-key';
import { Notices } from './notices';
import { PanelFrame } from './panel-frame';

/** Makes a batch: which design, how many boards, for when. */
@Component({
  selector: 'app-new-batch-panel',
  imports: [PanelFrame, ProblemList, RouterLink, Swatch],
  templateUrl: './new-batch-panel.html',
  styleUrl: './new-batch-panel.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class NewBatchPanel {
  private readonly apollo = inject(Apollo);
  private readonly notices = inject(Notices);
  private readonly store = inject(FloorStore);
  protected readonly board = inject(FloorBoard);
  protected readonly panels = inject(FloorPanels);
  private readonly frame = viewChild.required(PanelFrame);
  /** The same for every attempt with this form: a repeated one makes no second batch. */
  private readonly idempotencyKey = freshKey();

  protected readonly fields = ['designId', 'boards', 'dueDate'];
  protected readonly most = MOST_BOARDS;
  protected readonly designs = computed(() => [...(this.store.around()?.designs.values() ?? [])]);
  protected readonly problems = signal<readonly FormProblem[]>([]);
  protected readonly busy = signal(false);
  protected readonly has = has;

  protected async make(event: Event): Promise<void> {
    event.preventDefault();
    if (this.busy()) return;
    const form = new FormData(event.target as HTMLFormElement);
    const input = this.read(form);
    if (!input) return;
    this.busy.set(true);
    try {
      const { data } = await firstValueFrom(
        this.apollo.mutate({
          mutation: MakeBatchDocument,
          variables: { input },
          fetchPolicy: 'no-cache',
        }),
      );
      const answer = data?.createBatch;
      if (answer?.batch) {
        this.store.take(answer.batch);
        this.notices.say(`${answer.batch.code} is queued.`);
        this.frame().close();
      } else {
        this.problems.set(answer?.problems ?? []);
      }
    } catch (error) {
      this.problems.set([{ field: null, sentence: failureSentence(error) }]);
    } finally {
      this.busy.set(false);
    }
  }

  private read(form: FormData): CreateBatchInput | null {
    const text = (name: string) => String(form.get(name) ?? '').trim();
    const designId = text('designId');
    const parsed = batchSchemaOn(this.board.today()).safeParse({
      boards: text('boards') === '' ? Number.NaN : Number(text('boards')),
      dueDate: text('dueDate') || null,
      idempotencyKey: this.idempotencyKey,
    });
    const problems: FormProblem[] = (parsed.error?.issues ?? []).map((issue) => ({
      field: issue.path.join('.'),
      sentence: issue.message,
    }));
    if (designId === '') problems.unshift({ field: 'designId', sentence: 'Choose a design.' });
    this.problems.set(problems);
    return parsed.success && designId !== '' ? { designId, ...parsed.data } : null;
  }
}
