/** What the main thread is doing; the control thread ends running code only while it is the user's. */
export const phase = { idle: 0, compiling: 1, running: 2 } as const;
