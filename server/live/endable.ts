/**
 * A stream that can be ended while it waits. An async generator queues `return` behind the `next` that it is busy with, so
 * that one who leaves a quiet shop would stay until something happens there; `end` must make that `next` settle.
 */
export function endable<Item>(
  source: AsyncGenerator<Item, void, undefined>,
  end: () => void,
): AsyncGenerator<Item, void, undefined> {
  const stream: AsyncGenerator<Item, void, undefined> = {
    next: () => source.next(),
    return: (value) => {
      end();
      return source.return(value);
    },
    throw: (error) => {
      end();
      return source.throw(error);
    },
    [Symbol.asyncIterator]: () => stream,
  };
  return stream;
}
