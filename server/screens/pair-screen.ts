import { readCode } from '#shared/screens/pairing-code';
import { screenNameSchema } from '#shared/screens/screen-schema';
import { problemSentence } from '#shared/words/problem-words';
import { appendEvent } from '#server/db/events';
import { newId } from '#server/db/uuid';
import type { ScreensPayload } from '#server/generated/schema';
import { memberOf, type Context } from '#server/http/context';
import { inputProblems, problem, type Problem } from '#server/http/problem';
import { readScreens } from './read-screens';

/** Takes the code that a display shows, and gives the display to this shop. */
export async function pairScreen(
  context: Context,
  typedCode: string,
  typedName: string,
): Promise<ScreensPayload> {
  const { services } = context;
  const { shopId, memberId } = memberOf(context);
  const refused = async (problems: Problem[]) => ({
    screens: await readScreens(context),
    problems,
  });
  const name = screenNameSchema.safeParse(typedName);
  if (!name.success) return refused(inputProblems(name, 'name'));
  const now = services.now();
  const screenId = newId(now.getTime());
  // A text that can be no code is tried all the same, so that it counts as an attempt.
  const code = readCode(typedCode) ?? 'NO CODE';
  const [claim] = await services.doors.entry<{ answer: string }>(
    'select entry.claim_pairing($1, $2, $3, $4, $5) as answer',
    [code, shopId, memberId, screenId, name.data],
  );
  const wrong = problemOf(claim?.answer);
  if (wrong) return refused([wrong]);
  await services.doors.inShop(shopId, (tx) =>
    appendEvent(tx, shopId, {
      type: 'SCREEN_PAIRED',
      by: memberId,
      happenedAt: now,
      recordedAt: now,
      data: { screenId },
    }),
  );
  services.hub.wake();
  await context.forget();
  return { screens: await readScreens(context), problems: [] };
}

function problemOf(answer: string | undefined): Problem | null {
  switch (answer) {
    case 'OK':
      return null;
    case 'USED':
      return problem('CODE_USED', problemSentence({ code: 'CODE_USED' }), 'code');
    case 'EXPIRED':
      return problem('CODE_EXPIRED', problemSentence({ code: 'CODE_EXPIRED' }), 'code');
    case 'TOO_MANY':
      return problem('TOO_MANY_CODES', problemSentence({ code: 'TOO_MANY_CODES' }), 'code');
    default:
      return problem('CODE_WRONG', problemSentence({ code: 'CODE_WRONG' }), 'code');
  }
}
