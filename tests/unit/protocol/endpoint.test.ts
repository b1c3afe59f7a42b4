import { MessageChannel } from 'node:worker_threads';
import { describe, expect, it } from 'vitest';
import {
  CancelledError,
  connect,
  nodePort,
  portPair,
  ProtocolError,
  serve,
  type Handlers,
  type Port,
} from '../../../sim/protocol/index.js';

type Echo = {
  echo: { payload: string; progress: never; result: string };
  count: { payload: number; progress: number; result: number };
  fail: { payload: string; progress: never; result: never };
};

/** Lets everything that was posted arrive. */
const settle = () => new Promise((resolve) => setTimeout(resolve, 5));

const handlers: Handlers<Echo> = {
  echo: (text) => text,
  count: async (most, progress) => {
    for (let i = 0; i < most; i++) await progress.send(i);
    return most;
  },
  fail: (text) => {
    throw new Error(text);
  },
};

function inProcess() {
  const [near, far] = portPair();
  serve<Echo>(far, handlers);
  return connect<Echo>(near);
}

function overChannel() {
  const { port1, port2 } = new MessageChannel();
  serve<Echo>(nodePort(port2), handlers);
  return connect<Echo>(nodePort(port1));
}

describe.each([
  ['in process', inProcess],
  ['over a channel of threads', overChannel],
])('a client and a server %s', (_, pair) => {
  it('give each request its own answer, whatever the order', async () => {
    const client = pair();
    const answers = ['a', 'b', 'c'].map((text) => client.request('echo', text).result);
    expect(await Promise.all(answers)).toEqual(['a', 'b', 'c']);
  });

  it('send progress in order before the one ending', async () => {
    const seen: number[] = [];
    const task = pair().request('count', 20, (i) => seen.push(i));
    expect(await task.result).toBe(20);
    expect(seen).toEqual(Array.from({ length: 20 }, (_, i) => i));
  });

  it('say that a method threw, with its sentence', async () => {
    const failure = await pair().request('fail', 'No solution.').result.catch((error: unknown) => error); // prettier-ignore
    expect(failure).toBeInstanceOf(ProtocolError);
    expect(failure).toMatchObject({ code: 'failed', message: 'No solution.' });
  });

  it('end a cancelled request as cancelled, once, and go on with others', async () => {
    const client = pair();
    const task = client.request('count', 1e9, (i) => {
      if (i === 3) task.cancel();
    });
    await expect(task.result).rejects.toBeInstanceOf(CancelledError);
    expect(await client.request('echo', 'still there').result).toBe('still there');
  });
});

describe('flow control', () => {
  it('holds the server back while the client takes nothing', async () => {
    const [near, far] = portPair();
    const posted: unknown[] = [];
    serve<Echo>({ ...far, post: (message) => posted.push(message) }, handlers);
    near.post({ type: 'request', id: 1, method: 'count', payload: 100 });
    near.listen(
      () => undefined,
      () => undefined,
    );
    await settle();
    expect(posted).toHaveLength(4);
    near.post({ type: 'credit', id: 1, count: 2 });
    await settle();
    expect(posted).toHaveLength(6);
  });
});

describe('a broken connection', () => {
  it('rejects all that is pending when the other side crashes, and all that comes after', async () => {
    let crash: (reason: string) => void = () => undefined;
    const dead: Port = { post: () => undefined, listen: (_, crashed) => (crash = crashed) };
    const client = connect<Echo>(dead);
    const pending = [client.request('echo', 'a').result, client.request('count', 3).result];
    const outcomes = Promise.allSettled(pending);
    crash('out of memory');
    for (const outcome of await outcomes)
      expect(outcome).toMatchObject({ status: 'rejected', reason: { code: 'crashed', message: 'The solver stopped: out of memory.' } }); // prettier-ignore
    await expect(client.request('echo', 'b').result).rejects.toMatchObject({ code: 'crashed' });
  });

  it.each([
    undefined,
    'done',
    { type: 'done' },
    { type: 'done', id: -1, result: 0 },
    { type: '__proto__', id: 1 },
    { type: 'failed', id: 1, error: 'x' },
  ])('refuses what is no message of the protocol: %j', async (message) => {
    let receive: (message: unknown) => void = () => undefined;
    const client = connect<Echo>({ post: () => undefined, listen: (to) => (receive = to) });
    const { result } = client.request('echo', 'a');
    receive(message);
    await expect(result).rejects.toMatchObject({ code: 'bad-message' });
  });

  it('is not a failure of another request: an answer nobody waits for is dropped', async () => {
    let receive: (message: unknown) => void = () => undefined;
    const client = connect<Echo>({ post: () => undefined, listen: (to) => (receive = to) });
    const { result } = client.request('echo', 'a');
    receive({ type: 'done', id: 99, result: 'stray' });
    receive({ type: 'done', id: 1, result: 'mine' });
    receive({ type: 'failed', id: 1, error: { code: 'failed', message: 'too late' } });
    expect(await result).toBe('mine');
  });

  it('a method that is not there is refused by name', async () => {
    const [near, far] = portPair();
    serve<Echo>(far, handlers);
    const client = connect<Record<string, { payload: unknown; progress: unknown; result: unknown }>>(near);
    await expect(client.request('toString', null).result).rejects.toMatchObject({ code: 'unknown-method' });
  });
});
