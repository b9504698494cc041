/** General problems of commands, with what their sentences need to know. */
export type GeneralProblem =
  | { code: 'NOT_FOUND' }
  | { code: 'VERSION_CONFLICT' }
  | { code: 'IDEMPOTENCY_MISMATCH' }
  | { code: 'REFERENCE_TAKEN'; orderCode: string }
  | { code: 'WRONG_PASSWORD' }
  | { code: 'EMAIL_TAKEN' }
  | { code: 'NO_SHOP' }
  | { code: 'NAME_TAKEN' }
  | { code: 'CLAMPS_IN_USE'; count: number; change: 'LENGTH' | 'COUNT' }
  | { code: 'CLAMPS_IN_USE'; count: number; change: 'REMOVAL'; millimetres: string }
  | { code: 'TRY_LATER'; seconds: number }
  | { code: 'CODE_WRONG' }
  | { code: 'CODE_USED' }
  | { code: 'CODE_EXPIRED' }
  | { code: 'TOO_MANY_CODES' };

/** What a person reads about a general problem: what is wrong, and the way out. */
export function problemSentence(problem: GeneralProblem): string {
  switch (problem.code) {
    case 'NOT_FOUND':
      return 'This is not in your shop, or not any more. Look at the list again.';
    case 'VERSION_CONFLICT':
      return 'Someone changed this while you were at it. You now see it as it is; do yours again if it still fits.';
    case 'IDEMPOTENCY_MISMATCH':
      return 'This key was used for something else. Use a new key for a new request.';
    case 'REFERENCE_TAKEN':
      return `Order ${problem.orderCode} has this reference already. Each reference stands for one order.`;
    case 'WRONG_PASSWORD':
      return 'The address and the password do not belong together.';
    case 'EMAIL_TAKEN':
      return 'Someone has signed up with this address. Sign in instead.';
    case 'NO_SHOP':
      return 'You belong to no shop any more. Ask its owner, or sign up for one of your own.';
    case 'NAME_TAKEN':
      return 'Another one has this name. Choose a different one.';
    case 'CLAMPS_IN_USE':
      return clampsInUse(problem);
    case 'TRY_LATER':
      return problem.seconds === 1
        ? 'Too many tries. Wait a second, then try again.'
        : `Too many tries. Wait ${problem.seconds} seconds, then try again.`;
    case 'CODE_WRONG':
      return 'No display shows this code. Read it again from the display.';
    case 'CODE_USED':
      return 'This code was used already. Let the display show a new one.';
    case 'CODE_EXPIRED':
      return 'This code has run out. Let the display show a new one.';
    case 'TOO_MANY_CODES':
      return 'Too many wrong codes. Wait ten minutes, then try again.';
  }
}

/** Two people commanded the same batch: says whose command came first. */
export function conflictSentence(batchCode: string, personName: string | null): string {
  const who = personName ?? 'Someone';
  return `${who} changed ${batchCode} a moment before you. You now see it as it is; do yours again if it still fits.`;
}

function clampsInUse(problem: Extract<GeneralProblem, { code: 'CLAMPS_IN_USE' }>): string {
  const { count } = problem;
  const used = count === 1 ? '1 clamp is' : `${count} clamps are`;
  switch (problem.change) {
    case 'LENGTH':
      return `${used} in use now, so the length stays until they are off.`;
    case 'COUNT':
      return `${used} in use now, so keep at least ${count} until they are off.`;
    case 'REMOVAL':
      return `${used} in use now of those for ${problem.millimetres} mm, so the length cannot go until they are off.`;
  }
}
