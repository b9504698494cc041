/** What is built for tests has names of its own in dist/, so that a server that runs meanwhile keeps its files. */
export const TEST_BUILD = 'test-';

/** The key with which test servers encrypt; always the same, so that they can read each other's data and kept dumps. */
export const TEST_SECRET = `test:${'5e'.repeat(32)}`;
