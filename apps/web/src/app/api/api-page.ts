import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { Apollo } from 'apollo-angular';
import { firstValueFrom } from 'rxjs';
import {
  ApiKeysDocument,
  RevokeApiKeyDocument,
  type ApiKeyFieldsFragment,
} from '../graphql/generated/graphql';
import { ServerClock } from '../graphql/server-clock';
import { Session } from '../session/session';
import { Ask } from '../ui/ask';
import { CopyText } from '../ui/copy-text';
import { FailedPanel } from '../ui/failed-panel';
import { failureKind, type FailureKind } from '../ui/failure-kind';
import { failureSentence } from '../ui/failure-sentence';
import { Icon } from '../ui/icon';
import { ProblemList, type FormProblem } from '../ui/problem-list';
import { Skeleton } from '../ui/skeleton';
import { StatePanel } from '../ui/state-panel';
import { ago, dayName } from '../ui/when';
import { curlExample, keyState, scopeName } from './key-words';
import { NewKey } from './new-key';

/** The keys with which other systems read this shop. */
@Component({
  selector: 'app-api-page',
  imports: [CopyText, FailedPanel, Icon, NewKey, ProblemList, Skeleton, StatePanel],
  templateUrl: './api-page.html',
  styleUrl: './api-page.scss',
  host: { class: 'ct-page' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ApiPage {
  private readonly apollo = inject(Apollo);
  private readonly ask = inject(Ask);
  private readonly clock = inject(ServerClock);
  private readonly session = inject(Session);

  /** The newest first; null while they are read. */
  protected readonly keys = signal<readonly ApiKeyFieldsFragment[] | null>(null);
  protected readonly failure = signal<FailureKind | null>(null);
  protected readonly problems = signal<readonly FormProblem[]>([]);
  protected readonly busy = signal(false);
  protected readonly adding = signal(false);
  protected readonly example = curlExample(location.origin);
  protected readonly scopeName = scopeName;

  constructor() {
    void this.read();
  }

  protected async read(): Promise<void> {
    try {
      const { data } = await firstValueFrom(this.apollo.query({ query: ApiKeysDocument }));
      if (!data) throw new Error('The server gave no answer.');
      this.clock.observe(data.now);
      this.keys.set(data.apiKeys);
      this.failure.set(null);
    } catch (error) {
      if (this.keys() === null) this.failure.set(failureKind(error));
    }
  }

  protected state(key: ApiKeyFieldsFragment): string {
    return keyState(key, this.clock.minute());
  }

  protected day(at: string): string {
    return dayName(at, this.session.zone(), this.clock.minute());
  }

  protected ago(at: string): string {
    return ago(at, this.clock.minute());
  }

  protected async revoke(key: ApiKeyFieldsFragment): Promise<void> {
    if (this.busy()) return;
    const answer = await this.ask.ask({
      heading: `Revoke ${key.name}?`,
      text: 'Whatever uses this key is refused from now on. A revoked key does not come back.',
      action: 'Revoke it',
      dangerous: true,
    });
    if (!answer) return;
    this.busy.set(true);
    try {
      const { data } = await firstValueFrom(
        this.apollo.mutate({ mutation: RevokeApiKeyDocument, variables: { id: key.id } }),
      );
      this.problems.set(data?.revokeApiKey.problems ?? []);
      await this.read();
    } catch (error) {
      this.problems.set([{ field: null, sentence: failureSentence(error) }]);
    } finally {
      this.busy.set(false);
    }
  }
}
