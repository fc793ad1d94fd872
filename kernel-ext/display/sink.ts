/**
 * Where displays go while code runs. The kernel puts its own sink here; without one (a plain script, a test) nothing is
 * shown and results speak through their plain text.
 */

/** A MIME bundle: media type to content, as in the Jupyter messaging specification. */
export interface MimeBundle {
  [mediaType: string]: unknown;
}

/** Takes displays and updates of displays that were shown under an id. */
export interface DisplaySink {
  show(bundle: MimeBundle, displayId?: string): void;
  update(displayId: string, bundle: MimeBundle): void;
}

/** The well-known symbol under which a value offers its MIME bundle to a JavaScript kernel (a bundle or a promise of one). */
export const displaySymbol: unique symbol = Symbol.for("Jupyter.display") as never;

/** A value that can show itself in a notebook. */
export interface Displayable {
  [displaySymbol](): MimeBundle | Promise<MimeBundle>;
}

let current: DisplaySink | undefined;

/** Sets the sink that displays go to from now on, or removes it. */
export function setDisplaySink(sink: DisplaySink | undefined): void {
  current = sink;
}

/** The sink in force, if any. */
export function displaySink(): DisplaySink | undefined {
  return current;
}
