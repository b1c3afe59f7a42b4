import { decodeServerMessage } from './codec.js';
import { CancelledError, ProtocolError } from './errors.js';
import type { ClientMessage, Methods, ServerMessage } from './messages.js';
import type { Port } from './port.js';

/** A request under way. */
export interface Task<Result> {
  /** Rejects with CancelledError, or ProtocolError (`failed`, `unknown-method`, `crashed`, `bad-message`). */
  result: Promise<Result>;
  /** Asks the server to stop; the ending still comes as `result`. */
  cancel(): void;
}

export interface Client<M extends Methods> {
  request<Name extends keyof M & string>(
    method: Name,
    payload: M[Name]['payload'],
    onProgress?: (progress: M[Name]['progress']) => void,
  ): Task<M[Name]['result']>;
}

interface Pending {
  progress: (value: unknown) => void;
  resolve: (value: unknown) => void;
  reject: (error: Error) => void;
}

/** Connects to the server at the other end of a port. */
export function connect<M extends Methods>(port: Port): Client<M> {
  return new PendingRequests(port);
}

class PendingRequests<M extends Methods> implements Client<M> {
  private readonly pending = new Map<number, Pending>();
  private next = 1;
  private crash: ProtocolError | null = null;

  constructor(private readonly port: Port) {
    port.listen(
      (message) => this.receive(message),
      (reason) => this.fail(new ProtocolError('crashed', `The solver stopped: ${reason}.`)),
    );
  }

  request<Name extends keyof M & string>(
    method: Name,
    payload: M[Name]['payload'],
    onProgress: (progress: M[Name]['progress']) => void = () => undefined,
  ): Task<M[Name]['result']> {
    const id = this.next++;
    const result = new Promise<M[Name]['result']>((resolve, reject) => {
      if (this.crash) return reject(this.crash);
      this.pending.set(id, { progress: onProgress, resolve, reject });
      this.post({ type: 'request', id, method, payload });
    });
    return { result, cancel: () => this.pending.has(id) && this.post({ type: 'cancel', id }) };
  }

  private post(message: ClientMessage): void {
    this.port.post(message);
  }

  private receive(raw: unknown): void {
    try {
      this.settle(decodeServerMessage(raw));
    } catch (error) {
      this.fail(error instanceof Error ? error : new Error(String(error)));
    }
  }

  private settle(message: ServerMessage): void {
    const request = this.pending.get(message.id);
    if (!request) return;
    if (message.type === 'progress') {
      request.progress(message.progress);
      return this.post({ type: 'credit', id: message.id, count: 1 });
    }
    this.pending.delete(message.id);
    if (message.type === 'done') request.resolve(message.result);
    else if (message.type === 'cancelled') request.reject(new CancelledError());
    else request.reject(new ProtocolError(message.error.code, message.error.message));
  }

  /** The other side is gone or speaks another language: nothing that is pending can end well. */
  private fail(error: Error): void {
    this.crash = error instanceof ProtocolError ? error : new ProtocolError('crashed', error.message);
    for (const { reject } of this.pending.values()) reject(this.crash);
    this.pending.clear();
  }
}
