/**
 * A set-up problem that a person can mend. Its message is one sentence that says what is wrong and what to do; the
 * launcher prints it without a stack and ends.
 */
export class Stop extends Error {}

/** The exit code with which the server says: my one sentence on stderr is about the set-up, not a crash. */
export const SETUP_EXIT_CODE = 78;
