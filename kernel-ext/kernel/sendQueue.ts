/**
 * Sends frames one after the other, each awaited: zeromq refuses a second send while one is under way and a synchronous
 * loop may produce any number of them.
 *
 * No continuation of an async function is relied on: ending an endless loop by force drops whatever microtasks are
 * queued at that moment, so the wait for the send under way can be renewed at any time with {@link SendQueue.revive}.
 */

import type { Frame } from "./wire";

/** The part of a zeromq socket that is needed here. */
export interface FrameSocket {
  send(frames: Frame[]): Promise<void>;
}

/** Text of one stream of one cell, merged with what follows it while it waits. */
interface StreamEntry {
  key: unknown;
  name: string;
  text: string[];
  length: number;
  compose(text: string): Frame[];
}

type Entry = { frames: Frame[] } | StreamEntry;

/** Waiting text is merged up to this many characters; more goes into a message of its own. */
const mergeLimit = 1 << 18;

export class SendQueue {
  private entries: Entry[] = [];
  private next = 0;
  private current: Promise<void> | undefined;
  private drained: (() => void)[] = [];

  constructor(
    private readonly socket: FrameSocket,
    private readonly onError: (error: unknown) => void,
  ) {}

  /** How many messages wait. */
  get waiting(): number {
    return this.entries.length - this.next;
  }

  push(frames: Frame[]): void {
    this.entries.push({ frames });
    this.pump();
  }

  /**
   * Queues text of a stream; text that directly follows text of the same `key` and `name` joins its message if that one
   * still waits.
   */
  pushText(key: unknown, name: string, text: string, compose: (text: string) => Frame[]): void {
    const last = this.next < this.entries.length ? this.entries[this.entries.length - 1] : undefined;
    if (last && "text" in last && last.key === key && last.name === name && last.length < mergeLimit) {
      last.text.push(text);
      last.length += text.length;
      return;
    }
    this.entries.push({ key, name, text: [text], length: text.length, compose });
    this.pump();
  }

  /** Resolves when everything queued so far has been handed to the socket. */
  drain(): Promise<void> {
    if (!this.current && this.waiting === 0) return Promise.resolve();
    return new Promise((resolve) => this.drained.push(resolve));
  }

  /** Waits anew for the send under way. */
  revive(): void {
    if (this.current) this.await(this.current);
    else this.pump();
  }

  private pump(): void {
    if (this.current) return;
    if (this.next >= this.entries.length) {
      this.entries = [];
      this.next = 0;
      for (const resolve of this.drained.splice(0)) resolve();
      return;
    }
    const entry = this.entries[this.next++];
    if (this.next > 1024) {
      this.entries.splice(0, this.next);
      this.next = 0;
    }
    try {
      this.current = this.socket.send("text" in entry ? entry.compose(entry.text.join("")) : entry.frames);
    } catch (error) {
      this.onError(error);
      this.pump();
      return;
    }
    this.await(this.current);
  }

  private await(promise: Promise<void>): void {
    const done = (): void => {
      if (this.current !== promise) return;
      this.current = undefined;
      this.pump();
    };
    promise.then(done, (error) => {
      if (this.current !== promise) return;
      this.onError(error);
      done();
    });
  }
}
