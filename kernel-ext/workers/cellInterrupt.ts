import { later } from "../kernel/ownTimers";

/** Milliseconds between two looks. */
const period = 25;
/** Looks in a row that find the other timer silent. */
const patience = 4;

/**
 * Tells when the notebook cell that asked for a piece of work has been interrupted.
 *
 * The kernel takes a cell's timers away when the cell is interrupted, and those of nobody else. Two timers run here, one that
 * belongs to the cell and one that does not. Both are due in the same turns of the event loop, so that however busy the thread
 * is, the one beats only a few times without the other when the other is gone. Outside the kernel this never happens.
 *
 * @returns what ends the watch
 */
export function watchCellInterrupt(onInterrupt: () => void): () => void {
  let beats = 0;
  let silent = 0;
  let ended = false;
  const ofTheCell = setInterval(() => {
    beats++;
  }, period);
  const look = (): void => {
    if (ended) return;
    silent = beats === 0 ? silent + 1 : 0;
    beats = 0;
    if (silent > patience) {
      ended = true;
      onInterrupt();
      return;
    }
    later(look, period);
  };
  later(look, period);
  return () => {
    ended = true;
    clearInterval(ofTheCell);
  };
}
