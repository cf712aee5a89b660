import { createReadStream } from "node:fs";

/** A file of this machine in pieces, each time from its start; memory doesn't grow with it. */
export function filePieces(file: string, pieceBytes = 1 << 20): () => AsyncGenerator<Uint8Array> {
  return async function* pieces() {
    for await (const piece of createReadStream(file, { highWaterMark: pieceBytes })) {
      if (piece instanceof Uint8Array) yield piece;
    }
  };
}
