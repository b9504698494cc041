/** General problems of commands, with what their sentences need to know. */
export type GeneralProblem =
  | { code: 'NOT_FOUND' }
  | { code: 'VERSION_CONFLICT' }
  | { code: 'IDEMPOTENCY_MISMATCH' }
  | { code: 'REFERENCE_TAKEN'; orderCode: string }
  | { code: 'WRONG_PASSWORD' }
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
