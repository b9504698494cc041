import { ChangeDetectionStrategy, Component, inject, Injector, input, signal } from '@angular/core';
import { Router, RouterLink } from '@angular/router';
import { Apollo } from 'apollo-angular';
import { firstValueFrom } from 'rxjs';
import { SignInDocument } from '../graphql/generated/graphql';
import { failureSentence } from '../ui/failure-sentence';
import { focusFirstProblem } from '../ui/focus-problem';
import { has, ProblemList, type FormProblem } from '../ui/problem-list';
import { EntryFrame } from './entry-frame';
import { Session } from './session';
import { firstPage, safeNext } from './session-guard';

@Component({
  selector: 'app-sign-in-page',
  imports: [EntryFrame, ProblemList, RouterLink],
  templateUrl: './sign-in-page.html',
  styleUrl: './entry-form.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SignInPage {
  private readonly apollo = inject(Apollo);
  private readonly injector = inject(Injector);
  private readonly router = inject(Router);
  private readonly session = inject(Session);

  /** From the address: where to go afterwards, and whether a session was just ended. */
  readonly next = input<string>();
  readonly ended = input<string>();

  protected readonly busy = signal(false);
  protected readonly problems = signal<readonly FormProblem[]>([]);
  protected readonly has = has;

  protected async signIn(event: Event, email: string, password: string): Promise<void> {
    event.preventDefault();
    if (this.busy()) return;
    const missing = missingFields(email, password);
    this.problems.set(missing);
    const form = event.target as HTMLFormElement;
    if (missing.length > 0) {
      focusFirstProblem(form, this.injector);
      return;
    }
    this.busy.set(true);
    try {
      const variables = { email: email.trim(), password };
      const { data } = await firstValueFrom(
        this.apollo.mutate({ mutation: SignInDocument, variables }),
      );
      const viewer = data?.signIn.viewer;
      if (viewer) {
        await this.session.renew();
        await this.router.navigateByUrl(
          safeNext(this.next() ?? null) ?? firstPage(viewer.member.roles),
        );
      } else {
        this.problems.set(data?.signIn.problems ?? []);
      }
    } catch (error) {
      this.problems.set([{ field: null, sentence: failureSentence(error) }]);
    } finally {
      focusFirstProblem(form, this.injector);
      this.busy.set(false);
    }
  }
}

function missingFields(email: string, password: string): FormProblem[] {
  const problems: FormProblem[] = [];
  if (email.trim() === '') {
    problems.push({ field: 'email', sentence: 'Enter your e-mail address.' });
  }
  if (password === '') problems.push({ field: 'password', sentence: 'Enter your password.' });
  return problems;
}
