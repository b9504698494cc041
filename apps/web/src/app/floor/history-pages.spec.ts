import { mergeHistory } from './history-pages';

const page = (seqs: number[], endCursor: string | null) => ({
  nodes: seqs.map((seq) => ({ seq })),
  pageInfo: { hasNextPage: endCursor !== null, endCursor },
});

describe('mergeHistory', () => {
  it('begins with the newest page', () => {
    expect(mergeHistory(null, page([9, 8], 'c8'))).toEqual(page([9, 8], 'c8'));
  });

  it('puts what is new before what was read of the past', () => {
    expect(mergeHistory(page([9, 8, 7, 6, 5], 'c5'), page([10, 9, 8], 'c8'))).toEqual(
      page([10, 9, 8, 7, 6, 5], 'c5'),
    );
  });

  it('never leaves a gap', () => {
    expect(mergeHistory(page([5, 4, 3], 'c3'), page([10, 9, 8], 'c8'))).toEqual(
      page([10, 9, 8], 'c8'),
    );
  });
});
