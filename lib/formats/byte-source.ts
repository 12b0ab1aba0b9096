const PIECE_BYTES = 256 * 1024;
const HEAD_BYTES = 64 * 1024;

/** Where bytes come from: all at once, or as they arrive. */
export type ByteSource = Uint8Array | AsyncIterable<Uint8Array>;

/** A source whose first piece has been looked at; `pieces` begins with that piece again. */
export type PeekedBytes = { readonly head: Uint8Array; readonly pieces: AsyncIterable<Uint8Array> };

function joined(parts: readonly Uint8Array[], length: number): Uint8Array {
  const [only] = parts;
  if (parts.length === 1 && only !== undefined) return only;
  const whole = new Uint8Array(length);
  let at = 0;
  for (const part of parts) {
    whole.set(part, at);
    at += part.length;
  }
  return whole;
}

/**
 * Bytes in pieces of a useful size: small ones are joined (so that the first shows what the file is), large
 * ones are cut (so that limits are checked often).
 *
 * Shapes: every piece but the last has 64 KiB to 256 KiB. Errors: those of the source.
 */
export async function* steadyPieces(source: ByteSource): AsyncGenerator<Uint8Array> {
  if (source instanceof Uint8Array) {
    for (let at = 0; at < source.length; at += PIECE_BYTES) yield source.subarray(at, at + PIECE_BYTES);
    return;
  }
  let parts: Uint8Array[] = [];
  let length = 0;
  for await (const part of source) {
    parts.push(part);
    length += part.length;
    if (length < HEAD_BYTES) continue;
    const whole = joined(parts, length);
    for (let at = 0; at < whole.length; at += PIECE_BYTES) yield whole.subarray(at, at + PIECE_BYTES);
    parts = [];
    length = 0;
  }
  if (length > 0) yield joined(parts, length);
}

/** Looks at the first piece without losing it. An empty source has an empty head. */
export async function peekBytes(pieces: AsyncGenerator<Uint8Array>): Promise<PeekedBytes> {
  const first = await pieces.next();
  const head = first.done === true ? new Uint8Array(0) : first.value;
  async function* again(): AsyncGenerator<Uint8Array> {
    try {
      if (head.length > 0) yield head;
      yield* pieces;
    } finally {
      // A reader that stops at the head never entered the source; it must still be closed.
      await pieces.return(undefined);
    }
  }
  return { head, pieces: again() };
}

/** The whole source in one array; `spend` is told of every piece before it is kept, and may throw. */
export async function collectBytes(
  pieces: AsyncIterable<Uint8Array>,
  spend: (bytes: number) => void,
): Promise<Uint8Array> {
  const parts: Uint8Array[] = [];
  let length = 0;
  for await (const piece of pieces) {
    spend(piece.length);
    parts.push(piece);
    length += piece.length;
  }
  return joined(parts, length);
}
