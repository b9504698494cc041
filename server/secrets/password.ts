import { hash, verify, type Options } from '@node-rs/argon2';

/** Argon2id with 19 MiB, two passes, one lane: the first choice of OWASP's cheat sheet on password storage (2023). */
const OPTIONS: Options = { memoryCost: 19_456, timeCost: 2, parallelism: 1 };

/** Hashes at the same time: each takes a thread and 19 MiB. */
const MOST_AT_ONCE = 4;
let running = 0;
const waiting: (() => void)[] = [];

async function inTurn<T>(work: () => Promise<T>): Promise<T> {
  if (running >= MOST_AT_ONCE) await new Promise<void>((resolve) => waiting.push(resolve));
  else running++;
  try {
    return await work();
  } finally {
    // The place goes to the next in line, if there is one.
    const next = waiting.shift();
    if (next) next();
    else running--;
  }
}

/** A password's hash in argon2's own encoded form. */
export function hashPassword(password: string): Promise<string> {
  return inTurn(() => hash(password, OPTIONS));
}

/** What passwords are compared with where there is no hash, so that it takes as long: the hash of 32 random bytes. */
const STAND_IN =
  '$argon2id$v=19$m=19456,t=2,p=1$FwtHkEKiiSYK8ftrveZPVA$b6X0gIBdG5tLVLE+Mil5iW90Oue2Eq0nhDn6NsVF/ls';

/** Whether a password is the hashed one. Without a hash it is not, which takes the same time to say. */
export async function passwordMatches(
  password: string,
  passwordHash: string | null,
): Promise<boolean> {
  const matches = await inTurn(() => verify(passwordHash ?? STAND_IN, password, OPTIONS));
  return passwordHash !== null && matches;
}
