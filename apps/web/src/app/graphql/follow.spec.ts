import { follow, type Subscriber } from './follow';

interface Item {
  cursor: string;
  batches: string[];
}

/** A socket that, as the real client does, keeps the payload object and sends it again after a lost connection. */
class FakeSocket implements Subscriber {
  readonly sent: unknown[] = [];
  sink!: Parameters<Subscriber['subscribe']>[1];
  private payload: unknown;
  unsubscribed = 0;

  subscribe(...[payload, sink]: Parameters<Subscriber['subscribe']>): () => void {
    this.payload = payload;
    this.sink = sink;
    this.connect();
    return () => {
      this.unsubscribed += 1;
    };
  }
  connect(): void {
    this.sent.push(JSON.parse(JSON.stringify(this.payload)));
  }
  say(item: Item): void {
    this.sink.next({ data: { floorChanges: item } });
  }
  get lastAfter(): unknown {
    return (this.sent.at(-1) as { variables: { after: unknown } }).variables.after;
  }
}

const SOURCE = { query: 'subscription S { s }', operationName: 'S', field: 'floorChanges' };

function start(after: string | null) {
  const socket = new FakeSocket();
  const got: string[] = [];
  const failures: unknown[] = [];
  let ended = 0;
  const following = follow<Item>(socket, SOURCE, after, {
    item: (item) => got.push(item.cursor),
    failed: (reason) => failures.push(reason),
    ended: () => (ended += 1),
  });
  return { socket, got, failures, following, ended: () => ended };
}

describe('follow', () => {
  it('asks from the given place', () => {
    expect(start('7').socket.lastAfter).toBe('7');
  });

  it('goes on after the last message when the connection comes back', () => {
    const { socket, got } = start('7');
    socket.say({ cursor: '8', batches: [] });
    socket.say({ cursor: '9', batches: [] });
    socket.connect();
    expect(socket.lastAfter).toBe('9');
    socket.say({ cursor: '10', batches: [] });
    expect(got).toEqual(['8', '9', '10']);
  });

  it('hands a message on once when it comes twice around a reconnect', () => {
    const { socket, got } = start('7');
    socket.say({ cursor: '8', batches: [] });
    socket.connect();
    socket.say({ cursor: '8', batches: [] });
    expect(got).toEqual(['8']);
  });

  it('has no place before the first message of a subscription from now on', () => {
    const { socket, following } = start(null);
    expect(following.cursor()).toBeNull();
    socket.connect();
    expect(socket.lastAfter).toBeNull();
    socket.say({ cursor: '3', batches: [] });
    expect(following.cursor()).toBe('3');
  });

  it('reports errors inside a result, a refused subscription and an end', () => {
    const { socket, failures, ended } = start('1');
    socket.sink.next({ errors: [{ message: 'no' }] });
    socket.sink.error(new Error('closed'));
    socket.sink.complete();
    expect(failures).toHaveLength(2);
    expect(ended()).toBe(1);
  });

  it('says nothing any more once stopped', () => {
    const { socket, got, failures, following, ended } = start('1');
    following.stop();
    socket.say({ cursor: '2', batches: [] });
    socket.sink.error(new Error('late'));
    socket.sink.complete();
    expect([got, failures, ended(), socket.unsubscribed]).toEqual([[], [], 0, 1]);
  });
});
