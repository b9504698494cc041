/** What is built for tests has names of its own in dist/, so that a server that runs meanwhile keeps its files. */
export const TEST_BUILD = 'test-';
