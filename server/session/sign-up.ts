import { DEFAULT_FINISHES, DEFAULT_GLUES } from '#shared/route/default-profiles';
import { DEFAULT_ROUTE } from '#shared/route/default-route';
import { initialsOf } from '#shared/members/initials';
import { signUpSchema } from '#shared/session/sign-up-schema';
import {
  DEFAULT_CLAMPS,
  DEFAULT_SKILLS,
  DEFAULT_STATIONS,
  DEFAULT_WEEKLY,
} from '#shared/shop/defaults';
import { problemSentence } from '#shared/words/problem-words';
import type { Role } from '#shared/members/permissions';
import { newId } from '#server/db/uuid';
import type { SignInPayload, SignUpInput } from '#server/generated/schema';
import { waitSeconds } from '#server/http/address-limits';
import type { Context } from '#server/http/context';
import { inputProblems, problem } from '#server/http/problem';
import { hashPassword } from '#server/secrets/password';
import { openSession } from './open-session';
import { tryLater } from './try-later';

/** Makes a shop and its owner, and signs the owner in. */
export async function signUp(context: Context, input: SignUpInput): Promise<SignInPayload> {
  const { services } = context;
  const wait = waitSeconds(services, 'signUp', context.address);
  if (wait > 0) return { problems: [tryLater(wait)] };
  const parsed = signUpSchema.safeParse(input);
  if (!parsed.success) return { problems: inputProblems(parsed) };
  const { shopName, zone, name, email, password } = parsed.data;
  const now = services.now().getTime();
  const personId = newId(now);
  const owner = { id: newId(now), roles: ['OWNER'] satisfies Role[] };
  const shop = { id: newId(now), name: shopName, zone };
  const [made] = await services.doors.entry<{ made: boolean }>(
    'select entry.sign_up($1, $2, $3, $4, $5, $6, $7, $8) as made',
    [
      personId,
      email,
      await hashPassword(password),
      JSON.stringify({
        ...shop,
        weekly: DEFAULT_WEEKLY,
        skills: DEFAULT_SKILLS,
        route: DEFAULT_ROUTE,
      }),
      JSON.stringify({ ...owner, name, initials: initialsOf(name), skills: DEFAULT_SKILLS }),
      ...newShopSettings(),
    ],
  );
  if (!made?.made) {
    const sentence = problemSentence({ code: 'EMAIL_TAKEN' });
    return { problems: [problem('EMAIL_TAKEN', sentence, 'email')] };
  }
  const into = { shopId: shop.id, name: shopName, memberId: owner.id, roles: owner.roles };
  return openSession(context, { id: personId, email }, into);
}

/** Stations, clamps and profiles of a new shop, as entry.sign_up takes them. */
export function newShopSettings(): [stations: string, clamps: string, profiles: string] {
  const profiles = [DEFAULT_GLUES, DEFAULT_FINISHES].flatMap((kind) =>
    kind.map((figures, index) => ({ usual: index === 0, figures })),
  );
  return [
    JSON.stringify(DEFAULT_STATIONS),
    JSON.stringify(DEFAULT_CLAMPS.map((each) => ({ ...each, length: each.length.toString() }))),
    JSON.stringify(profiles),
  ];
}
