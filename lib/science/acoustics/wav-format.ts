import { Refusal } from "../refusal";

export interface WavFormat {
  sampleRateHz: number;
  channels: number;
  encoding: "int" | "float";
  /** Bits of a stored sample: 8, 16, 24 or 32; 32 or 64 for float. */
  bits: number;
  /** Bytes of one sample of every channel. */
  frameBytes: number;
}

/** Rates outside of this range, Hz, hold no recording that the bench can use. */
export const SAMPLE_RATE_RANGE_HZ = { from: 4000, to: 768000 } as const;

const TAG_PCM = 1;
const TAG_FLOAT = 3;
const TAG_EXTENSIBLE = 0xfffe;
/** Last 14 bytes of the sub-format identifiers KSDATAFORMAT_SUBTYPE_PCM and …_IEEE_FLOAT, whose first two are the tag. */
const SUBTYPE_TAIL = [0, 0, 0, 0, 16, 0, 0x80, 0, 0, 0xaa, 0, 0x38, 0x9b, 0x71];

function formatTag(view: DataView, at: string): number {
  const tag = view.getUint16(0, true);
  if (tag !== TAG_EXTENSIBLE) return tag;
  if (view.byteLength < 40) {
    throw new Refusal("wav-format-broken", "The extensible format chunk is shorter than 40 bytes.", at);
  }
  if (SUBTYPE_TAIL.some((value, i) => view.getUint8(26 + i) !== value)) {
    throw new Refusal("wav-encoding", "The extensible format names a sub-format that is not read.", at);
  }
  return view.getUint16(24, true);
}

/**
 * Reads the body of a `fmt ` chunk.
 *
 * In: its bytes and their place in the file. Out: sample rate in Hz and layout. Compressed encodings, zero channels or
 * rate, odd sample sizes and a frame size that doesn't add up are refused.
 * Source: RIFF/WAVE (Microsoft, 1994) and WAVEFORMATEXTENSIBLE (values from memory, common practice).
 */
export function parseWavFormat(body: Uint8Array, byteOffset: number): WavFormat {
  const at = `byte ${byteOffset}`;
  const view = new DataView(body.buffer, body.byteOffset, body.byteLength);
  if (view.byteLength < 16) throw new Refusal("wav-format-broken", "The format chunk is shorter than 16 bytes.", at);
  const tag = formatTag(view, at);
  const channels = view.getUint16(2, true);
  const sampleRateHz = view.getUint32(4, true);
  const frameBytes = view.getUint16(12, true);
  const bits = view.getUint16(14, true);
  if (tag !== TAG_PCM && tag !== TAG_FLOAT) {
    throw new Refusal("wav-encoding", `Encoding ${tag} is not read; integer PCM and IEEE float are.`, at);
  }
  if (channels === 0) throw new Refusal("wav-no-channels", "The file says that it has 0 channels.", at);
  if (sampleRateHz === 0) throw new Refusal("wav-no-rate", "The file says that its sample rate is 0 Hz.", at);
  if (sampleRateHz < SAMPLE_RATE_RANGE_HZ.from || sampleRateHz > SAMPLE_RATE_RANGE_HZ.to) {
    const { from, to } = SAMPLE_RATE_RANGE_HZ;
    throw new Refusal("wav-rate", `A sample rate of ${sampleRateHz} Hz is not read; ${from} to ${to} Hz are.`, at);
  }
  const encoding = tag === TAG_PCM ? "int" : "float";
  const sizes = encoding === "int" ? [8, 16, 24, 32] : [32, 64];
  if (!sizes.includes(bits)) {
    throw new Refusal("wav-bits", `Samples of ${bits} bits (${encoding}) are not read; ${sizes.join(", ")} are.`, at);
  }
  if (frameBytes !== (channels * bits) / 8) {
    throw new Refusal(
      "wav-format-broken",
      `A frame of ${frameBytes} bytes doesn't hold ${channels} × ${bits} bits.`,
      at,
    );
  }
  return { sampleRateHz, channels, encoding, bits, frameBytes };
}
