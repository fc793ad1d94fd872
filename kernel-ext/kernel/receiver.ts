/**
 * Receives frames one message after the other. Like the send queue it keeps the promise under way in plain sight, so that
 * the wait for it can be renewed when its continuation was dropped by ending running code by force.
 */
export interface ReceivingSocket {
  receive(): Promise<Buffer[]>;
  readonly closed: boolean;
}

export class Receiver {
  private current: Promise<Buffer[]> | undefined;

  constructor(
    private readonly socket: ReceivingSocket,
    private readonly onFrames: (frames: Buffer[]) => void,
    private readonly onError: (error: unknown) => void,
  ) {}

  /** Starts to receive. */
  start(): void {
    if (!this.current) this.next();
  }

  /** Waits anew for the message under way. */
  revive(): void {
    if (this.current) this.await(this.current);
  }

  private next(): void {
    this.current = undefined;
    if (this.socket.closed) return;
    this.current = this.socket.receive();
    this.await(this.current);
  }

  private await(promise: Promise<Buffer[]>): void {
    promise.then(
      (frames) => {
        if (this.current !== promise) return;
        this.next();
        this.onFrames(frames);
      },
      (error) => {
        if (this.current !== promise) return;
        this.current = undefined;
        if (!this.socket.closed) this.onError(error);
      },
    );
  }
}
