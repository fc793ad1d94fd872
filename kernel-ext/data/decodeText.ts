import { TableError } from "./tableError";

/** What the first bytes of a file that is no text tell. */
const signatures: readonly { bytes: readonly number[]; reason: string; hint: string }[] = [
  {
    bytes: [0x1f, 0x8b],
    reason: "is compressed (gzip)",
    hint: "decompress it first, for example with gzip -dc, and read standard input",
  },
  { bytes: [0x50, 0x41, 0x52, 0x31], reason: "is a Parquet file", hint: "name it .parquet" },
  { bytes: [0x50, 0x4b, 0x03, 0x04], reason: "is a ZIP archive or a spreadsheet", hint: "save the table as csv first" },
  { bytes: [0xff, 0xfe], reason: "is UTF-16 text", hint: "convert it to UTF-8 first, for example with iconv" },
  { bytes: [0xfe, 0xff], reason: "is UTF-16 text", hint: "convert it to UTF-8 first, for example with iconv" },
];

/**
 * The text of a stream of bytes, piece by piece; a byte order mark is left out.
 *
 * @throws TableError where the bytes are not UTF-8 text: another encoding, a compressed file, binary data
 */
export async function* decodeText(
  bytes: AsyncIterable<Uint8Array>,
  file: string,
): AsyncGenerator<string, void, undefined> {
  const decoder = new TextDecoder("utf-8", { fatal: true });
  let first = true;
  const decoded = (piece?: Uint8Array): string => {
    let text: string;
    try {
      text = piece === undefined ? decoder.decode() : decoder.decode(piece, { stream: true });
    } catch {
      throw new TableError({
        file,
        reason: "is not UTF-8 text",
        hint: "convert it to UTF-8 first, for example with iconv",
      });
    }
    if (text.includes("\0")) throw new TableError({ file, reason: "holds a NUL character: it is no text file" });
    return text;
  };
  for await (const piece of bytes) {
    if (first && piece.length > 0) {
      first = false;
      const known = signatures.find((signature) => signature.bytes.every((byte, index) => piece[index] === byte));
      if (known !== undefined) throw new TableError({ file, reason: known.reason, hint: known.hint });
    }
    const text = decoded(piece);
    if (text !== "") yield text;
  }
  const rest = decoded();
  if (rest !== "") yield rest;
}
