import { emailSchema } from '#shared/session/email-schema';
import { LONGEST_PASSWORD } from '#shared/session/sign-up-schema';
import { problemSentence } from '#shared/words/problem-words';
import type { SignInPayload } from '#server/generated/schema';
import { waitSeconds } from '#server/http/address-limits';
import type { Context } from '#server/http/context';
import { problem } from '#server/http/problem';
import { passwordMatches } from '#server/secrets/password';
import { openSession } from './open-session';
import { tryLater } from './try-later';
import { membershipsOf } from './viewer';

/**
 * Signs a person in. An unknown address, and one that can be no address, takes the same steps as a known one with a wrong
 * password: the same delay after failures, one comparison, one answer.
 */
export async function signIn(
  context: Context,
  typedEmail: string,
  typedPassword: string,
): Promise<SignInPayload> {
  const { services } = context;
  const wait = waitSeconds(services, 'signIn', context.address);
  if (wait > 0) return { problems: [tryLater(wait)] };
  const parsed = emailSchema.safeParse(typedEmail);
  const email = parsed.success ? parsed.data : 'nobody';
  const password = typedPassword.length <= LONGEST_PASSWORD ? typedPassword : '';
  const [attempt] = await services.doors.entry<{
    wait_seconds: number;
    person_id: string | null;
    password_hash: string | null;
  }>('select * from entry.begin_sign_in($1)', [email]);
  if (!attempt) throw new Error('An attempt to sign in was not counted.');
  if (attempt.wait_seconds > 0) return { problems: [tryLater(attempt.wait_seconds)] };
  const matches = await passwordMatches(password, attempt.password_hash);
  if (!matches || attempt.person_id === null) {
    return { problems: [problem('WRONG_PASSWORD', problemSentence({ code: 'WRONG_PASSWORD' }))] };
  }
  await services.doors.entry('select entry.forget_failures($1)', [email]);
  const [into] = await membershipsOf(services, attempt.person_id);
  if (!into) {
    return { problems: [problem('NO_SHOP', problemSentence({ code: 'NO_SHOP' }))] };
  }
  return openSession(context, { id: attempt.person_id, email }, into);
}
