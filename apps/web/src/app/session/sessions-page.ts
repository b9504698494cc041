import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { Apollo } from 'apollo-angular';
import { firstValueFrom } from 'rxjs';
import {
  EndOtherSessionsDocument,
  EndSessionDocument,
  SessionsDocument,
  type SessionFieldsFragment,
} from '../graphql/generated/graphql';
import { ServerClock } from '../graphql/server-clock';
import { Ask } from '../ui/ask';
import { FailedPanel } from '../ui/failed-panel';
import { failureSentence } from '../ui/failure-sentence';
import { ProblemList, type FormProblem } from '../ui/problem-list';
import { Skeleton } from '../ui/skeleton';
import { ago, dayTime } from '../ui/when';
import { deviceName } from './device-name';
import { Session } from './session';

/** Where one is signed in, and how to end that elsewhere. */
@Component({
  selector: 'app-sessions-page',
  imports: [FailedPanel, ProblemList, Skeleton],
  templateUrl: './sessions-page.html',
  host: { class: 'ct-page' },
  styles: `
    :host {
      display: block;
    }
    td:last-child {
      text-align: end;
    }
    @media (max-width: 600px) {
      .signed-in {
        display: none;
      }
      .ct-panel {
        padding: 8px;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SessionsPage {
  private readonly apollo = inject(Apollo);
  private readonly ask = inject(Ask);
  private readonly clock = inject(ServerClock);
  private readonly session = inject(Session);

  /** Null while they are read. */
  protected readonly sessions = signal<readonly SessionFieldsFragment[] | null>(null);
  protected readonly failed = signal(false);
  protected readonly deviceName = deviceName;
  protected readonly busy = signal(false);
  protected readonly problems = signal<readonly FormProblem[]>([]);
  protected readonly hasOthers = computed(() => (this.sessions() ?? []).some((s) => !s.current));

  constructor() {
    void this.read();
  }

  protected async read(): Promise<void> {
    this.failed.set(false);
    try {
      const { data } = await firstValueFrom(this.apollo.query({ query: SessionsDocument }));
      if (!data) throw new Error('The server gave no answer.');
      this.clock.observe(data.now);
      this.sessions.set(data.sessions);
    } catch {
      this.failed.set(true);
    }
  }

  protected async end(id: string): Promise<void> {
    await this.attempt(async () => {
      const mutation = EndSessionDocument;
      const { data } = await firstValueFrom(this.apollo.mutate({ mutation, variables: { id } }));
      return data?.endSession;
    });
  }

  protected async endOthers(): Promise<void> {
    const answer = await this.ask.ask({
      heading: 'End all other sessions?',
      text: 'Every other browser that is signed in as you has to sign in again.',
      action: 'End all others',
    });
    if (!answer) return;
    await this.attempt(async () => {
      const mutation = EndOtherSessionsDocument;
      const { data } = await firstValueFrom(this.apollo.mutate({ mutation }));
      return data?.endOtherSessions;
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
      | { sessions: readonly SessionFieldsFragment[]; problems: readonly FormProblem[] }
      | null
      | undefined
    >,
  ): Promise<void> {
    if (this.busy()) return;
    this.busy.set(true);
    try {
      const answer = await command();
      if (answer) {
        this.sessions.set(answer.sessions);
        this.problems.set(answer.problems);
      }
    } catch (error) {
      this.problems.set([{ field: null, sentence: failureSentence(error) }]);
    } finally {
      this.busy.set(false);
    }
  }
}
