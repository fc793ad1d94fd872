/**
 * The kernel's own timers, taken before cells get guarded ones: what the kernel waits for must come also when the cell is
 * interrupted, and whatever cells do to the global functions.
 */
import timers from "node:timers";
import timersPromises from "node:timers/promises";

export const nextTurn = timers.setImmediate;
export const later = timers.setTimeout;
export const sleep = timersPromises.setTimeout;
