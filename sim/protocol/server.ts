import { decodeClientMessage } from './codec.js';
import { CancelledError, ProtocolError } from './errors.js';
import type { ClientMessage, Methods, ServerMessage, WireError } from './messages.js';
import type { Port } from './port.js';

/** Progress messages a client can hold before it has taken any. */
const firstCredit = 4;

/** What a handler has of its request besides the payload. */
export interface Progress<Value> {
  readonly cancelled: boolean;
  /** Sends progress once the client has room for it. @throws CancelledError when the request was cancelled meanwhile */
  send(value: Value, transfer?: ArrayBuffer[]): Promise<void>;
}

/** Does one request; a CancelledError thrown ends it as cancelled, anything else thrown as failed. */
export type Handler<M extends Methods[string]> = (
  payload: M['payload'],
  progress: Progress<M['progress']>,
) => Promise<M['result']> | M['result'];
export type Handlers<M extends Methods> = { [Name in keyof M]: Handler<M[Name]> };

/** Answers the requests that come in at a port. */
export function serve<M extends Methods>(port: Port, handlers: Handlers<M>): void {
  const running = new Map<number, Credit>();
  const post = (message: ServerMessage, transfer?: ArrayBuffer[]) => port.post(message, transfer);

  const run = async ({ id, method, payload }: Extract<ClientMessage, { type: 'request' }>) => {
    const credit = new Credit((progress, transfer) => post({ type: 'progress', id, progress }, transfer));
    running.set(id, credit);
    try {
      const handler = Object.hasOwn(handlers, method) ? handlers[method as keyof M] : undefined;
      if (!handler) throw new ProtocolError('unknown-method', `There is no method '${method}'.`);
      const result: unknown = await handler(payload, credit);
      post({ type: 'done', id, result });
    } catch (error) {
      post(error instanceof CancelledError ? { type: 'cancelled', id } : { type: 'failed', id, error: wire(error) });
    } finally {
      running.delete(id);
    }
  };

  port.listen(
    (raw) => {
      const message = decodeClientMessage(raw);
      if (message.type === 'request') void run(message);
      else if (message.type === 'cancel') running.get(message.id)?.cancel();
      else running.get(message.id)?.add(message.count);
    },
    () => {
      for (const credit of running.values()) credit.cancel();
    },
  );
}

function wire(error: unknown): WireError {
  if (error instanceof ProtocolError) return { code: error.code, message: error.message };
  return { code: 'failed', message: error instanceof Error ? error.message : String(error) };
}

/** Room at the client for progress, and whether it still wants any. */
class Credit implements Progress<unknown> {
  cancelled = false;
  private left = firstCredit;
  private wake: (() => void) | null = null;

  constructor(private readonly post: (progress: unknown, transfer?: ArrayBuffer[]) => void) {}

  async send(value: unknown, transfer?: ArrayBuffer[]): Promise<void> {
    while (this.left === 0 && !this.cancelled) await new Promise<void>((resolve) => (this.wake = resolve));
    if (this.cancelled) throw new CancelledError();
    this.left -= 1;
    this.post(value, transfer);
  }

  add(count: number): void {
    this.left += count;
    this.wake?.();
  }

  cancel(): void {
    this.cancelled = true;
    this.wake?.();
  }
}
