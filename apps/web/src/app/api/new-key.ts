import {
  ChangeDetectionStrategy,
  Component,
  inject,
  Injector,
  output,
  signal,
  viewChild,
} from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { Apollo } from 'apollo-angular';
import { firstValueFrom } from 'rxjs';
import { CreateApiKeyDocument } from '../graphql/generated/graphql';
import { CopyText } from '../ui/copy-text';
import { failureSentence } from '../ui/failure-sentence';
import { FormDialog } from '../ui/form-dialog';
import { Icon } from '../ui/icon';
import { focusFirstProblem } from '../ui/focus-problem';
import { has, ProblemList, type FormProblem } from '../ui/problem-list';
import { curlExample, scopeMeaning, scopeName, SCOPES } from './key-words';

const LONGEST_NAME = 60;
/** Days that can be chosen; the API takes any number up to 730. */
const LIFETIMES = [
  { days: 90, words: 'in 90 days' },
  { days: 365, words: 'in a year' },
  { days: 730, words: 'in two years' },
  { days: null, words: 'never' },
] as const;

/** Makes a key and shows it, this once. */
@Component({
  selector: 'app-new-key',
  imports: [CopyText, FormDialog, Icon, ProblemList, ReactiveFormsModule],
  templateUrl: './new-key.html',
  styleUrl: './new-key.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class NewKey {
  private readonly apollo = inject(Apollo);
  private readonly injector = inject(Injector);
  private readonly builder = inject(NonNullableFormBuilder);
  private readonly dialog = viewChild.required(FormDialog);

  readonly made = output();
  readonly closed = output();

  protected readonly form = this.builder.group({
    name: '',
    ORDERS_READ: true,
    CUSTOMERS_READ: false,
    days: this.builder.control<number | null>(365),
  });
  protected readonly problems = signal<readonly FormProblem[]>([]);
  protected readonly busy = signal(false);
  /** The new key, while the dialog is open and never after. */
  protected readonly key = signal<string | null>(null);
  protected readonly example = curlExample(location.origin);
  protected readonly fields = ['name', 'scopes', 'expiresInDays'];
  protected readonly scopes = SCOPES;
  protected readonly lifetimes = LIFETIMES;
  protected readonly longestName = LONGEST_NAME;
  protected readonly has = has;
  protected readonly scopeName = scopeName;
  protected readonly scopeMeaning = scopeMeaning;
  protected readonly dirty = (): boolean => this.form.dirty && this.key() === null;

  protected close(): void {
    this.dialog().close();
  }

  protected async submit(event: Event): Promise<void> {
    const form = event.target as HTMLFormElement;
    await this.make();
    if (this.problems().length > 0) focusFirstProblem(form, this.injector);
  }

  private async make(): Promise<void> {
    if (this.busy()) return;
    const { name, days, ...ticked } = this.form.getRawValue();
    const scopes = SCOPES.filter((scope) => ticked[scope]);
    const problems: FormProblem[] = [];
    if (name.trim() === '') {
      problems.push({ field: 'name', sentence: 'Give the key a name, such as web shop.' });
    }
    if (scopes.length === 0) {
      problems.push({ field: 'scopes', sentence: 'Tick at least one thing that the key may do.' });
    }
    this.problems.set(problems);
    if (problems.length > 0) return;
    this.busy.set(true);
    try {
      const variables = { name: name.trim(), scopes, expiresInDays: days };
      const { data } = await firstValueFrom(
        // The key must not stay in the cache of this browser.
        this.apollo.mutate({ mutation: CreateApiKeyDocument, variables, fetchPolicy: 'no-cache' }),
      );
      const answer = data?.createApiKey;
      if (answer?.key) {
        this.key.set(answer.key);
        this.made.emit();
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
