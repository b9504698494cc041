import { ChangeDetectionStrategy, Component, inject, Injector, signal } from '@angular/core';
import { Router, RouterLink } from '@angular/router';
import { signUpSchema } from '#shared/session/sign-up-schema';
import { Apollo } from 'apollo-angular';
import { firstValueFrom } from 'rxjs';
import { SignUpDocument, type SignUpInput } from '../graphql/generated/graphql';
import { failureSentence } from '../ui/failure-sentence';
import { focusFirstProblem } from '../ui/focus-problem';
import { has, ProblemList, type FormProblem } from '../ui/problem-list';
import { EntryFrame } from './entry-frame';
import { Session } from './session';
import { browserZone, zones } from './zones';

const FIELDS = ['shopName', 'zone', 'name', 'email', 'password'] as const;

@Component({
  selector: 'app-sign-up-page',
  imports: [EntryFrame, ProblemList, RouterLink],
  templateUrl: './sign-up-page.html',
  styleUrl: './entry-form.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SignUpPage {
  private readonly apollo = inject(Apollo);
  private readonly injector = inject(Injector);
  private readonly router = inject(Router);
  private readonly session = inject(Session);

  protected readonly fields = FIELDS;
  protected readonly zones = zones();
  protected readonly zone = browserZone();
  protected readonly busy = signal(false);
  protected readonly problems = signal<readonly FormProblem[]>([]);
  protected readonly has = has;

  protected async signUp(event: Event, input: SignUpInput): Promise<void> {
    event.preventDefault();
    if (this.busy()) return;
    const wrong = wrongFields(input);
    this.problems.set(wrong);
    const form = event.target as HTMLFormElement;
    if (wrong.length > 0) {
      focusFirstProblem(form, this.injector);
      return;
    }
    this.busy.set(true);
    try {
      const { data } = await firstValueFrom(
        this.apollo.mutate({ mutation: SignUpDocument, variables: { input } }),
      );
      if (data?.signUp.viewer) {
        await this.session.renew();
        await this.router.navigateByUrl('/');
      } else {
        this.problems.set(data?.signUp.problems ?? []);
      }
    } catch (error) {
      this.problems.set([{ field: null, sentence: failureSentence(error) }]);
    } finally {
      focusFirstProblem(form, this.injector);
      this.busy.set(false);
    }
  }
}

function wrongFields(input: SignUpInput): FormProblem[] {
  const parsed = signUpSchema.safeParse(input);
  return (parsed.error?.issues ?? []).map((issue) => ({
    field: issue.path.map(String).join('.') || null,
    sentence: issue.message,
  }));
}
