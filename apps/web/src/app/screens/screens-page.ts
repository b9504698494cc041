import { ChangeDetectionStrategy, Component, inject, Injector, signal } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { RouterLink } from '@angular/router';
import { Apollo } from 'apollo-angular';
import { firstValueFrom } from 'rxjs';
import {
  PairScreenDocument,
  RevokeScreenDocument,
  ScreensDocument,
  type ScreenFieldsFragment,
} from '../graphql/generated/graphql';
import { ServerClock } from '../graphql/server-clock';
import { Session } from '../session/session';
import { Ask } from '../ui/ask';
import { FailedPanel } from '../ui/failed-panel';
import { failureKind, type FailureKind } from '../ui/failure-kind';
import { failureSentence } from '../ui/failure-sentence';
import { Icon } from '../ui/icon';
import { focusFirstProblem } from '../ui/focus-problem';
import { has, ProblemList, type FormProblem } from '../ui/problem-list';
import { Skeleton } from '../ui/skeleton';
import { StatePanel } from '../ui/state-panel';
import { ago, dayTime } from '../ui/when';
import { readPairing } from './pairing-draft';

const LONGEST_NAME = 60;

/** The displays in the shop: which there are, one more, one less. */
@Component({
  selector: 'app-screens-page',
  imports: [FailedPanel, Icon, ProblemList, ReactiveFormsModule, RouterLink, Skeleton, StatePanel],
  templateUrl: './screens-page.html',
  styleUrl: './screens-page.scss',
  host: { class: 'ct-page' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ScreensPage {
  private readonly apollo = inject(Apollo);
  private readonly injector = inject(Injector);
  private readonly ask = inject(Ask);
  private readonly clock = inject(ServerClock);
  private readonly session = inject(Session);

  /** Null while they are read. */
  protected readonly screens = signal<readonly ScreenFieldsFragment[] | null>(null);
  protected readonly failure = signal<FailureKind | null>(null);
  protected readonly problems = signal<readonly FormProblem[]>([]);
  protected readonly told = signal<string | null>(null);
  protected readonly busy = signal(false);
  protected readonly form = inject(NonNullableFormBuilder).group({ code: '', name: '' });
  protected readonly address = `${location.host}/screen`;
  protected readonly fields = ['code', 'name'];
  protected readonly longestName = LONGEST_NAME;
  protected readonly has = has;

  constructor() {
    void this.read();
  }

  protected async read(): Promise<void> {
    try {
      const { data } = await firstValueFrom(this.apollo.query({ query: ScreensDocument }));
      if (!data) throw new Error('The server gave no answer.');
      this.clock.observe(data.now);
      this.screens.set(data.screens);
      this.failure.set(null);
    } catch (error) {
      if (this.screens() === null) this.failure.set(failureKind(error));
    }
  }

  protected async submit(event: Event): Promise<void> {
    const form = event.target as HTMLFormElement;
    await this.pair();
    if (this.problems().length > 0) focusFirstProblem(form, this.injector);
  }

  private async pair(): Promise<void> {
    const { code, name, problems } = readPairing(this.form.getRawValue());
    this.problems.set(problems);
    this.told.set(null);
    if (problems.length > 0) return;
    await this.attempt(async () => {
      const { data } = await firstValueFrom(
        this.apollo.mutate({ mutation: PairScreenDocument, variables: { code, name } }),
      );
      const answer = data?.pairScreen;
      if (answer && answer.problems.length === 0) {
        this.form.reset();
        this.told.set(`${name} is paired. It shows the floor within a few seconds.`);
      }
      return answer;
    });
  }

  protected async revoke(screen: ScreenFieldsFragment): Promise<void> {
    const answer = await this.ask.ask({
      heading: `Revoke ${screen.name}?`,
      text: 'The display goes dark at once and shows a new code. It can be paired again.',
      action: 'Revoke it',
      dangerous: true,
    });
    if (!answer) return;
    this.told.set(null);
    await this.attempt(async () => {
      const { data } = await firstValueFrom(
        this.apollo.mutate({ mutation: RevokeScreenDocument, variables: { id: screen.id } }),
      );
      return data?.revokeScreen;
    });
  }

  protected ago(at: string): string {
    return ago(at, this.clock.minute());
  }

  protected when(at: string): string {
    return dayTime(at, this.session.zone(), this.clock.minute());
  }

  private async attempt(
    command: () => Promise<
      | { screens: readonly ScreenFieldsFragment[]; problems: readonly FormProblem[] }
      | null
      | undefined
    >,
  ): Promise<void> {
    if (this.busy()) return;
    this.busy.set(true);
    try {
      const answer = await command();
      if (!answer) throw new Error('The server gave no answer.');
      this.problems.set(answer.problems);
      if (answer.problems.length === 0) this.screens.set(answer.screens);
    } catch (error) {
      this.problems.set([{ field: null, sentence: failureSentence(error) }]);
    } finally {
      this.busy.set(false);
    }
  }
}
