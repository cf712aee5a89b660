/** Writes WAV files for tests, sound and broken ones alike. */
export interface WavSpec {
  channels?: Float64Array[];
  sampleRateHz?: number;
  encoding?: "int" | "float";
  bits?: number;
  extensible?: boolean;
  /** Chunks put before the data, odd sizes included. */
  extra?: { name: string; body: Uint8Array }[];
  /** Overrides of header fields. */
  header?: Partial<{ tag: number; channels: number; rate: number; frameBytes: number; bits: number }>;
  dataSize?: number;
  riffSize?: number;
}

const GUID_TAIL = [0, 0, 0, 0, 16, 0, 0x80, 0, 0, 0xaa, 0, 0x38, 0x9b, 0x71];
const text = (value: string) => Uint8Array.from(value, (letter) => letter.charCodeAt(0));

function chunk(name: string, body: Uint8Array, size = body.length): Uint8Array {
  const out = new Uint8Array(8 + body.length + (body.length % 2));
  out.set(text(name));
  new DataView(out.buffer).setUint32(4, size, true);
  out.set(body, 8);
  return out;
}

export function join(parts: readonly Uint8Array[]): Uint8Array {
  const out = new Uint8Array(parts.reduce((sum, part) => sum + part.length, 0));
  let at = 0;
  for (const part of parts) {
    out.set(part, at);
    at += part.length;
  }
  return out;
}

function sampleBytes(channels: readonly Float64Array[], encoding: "int" | "float", bits: number): Uint8Array {
  const frames = channels[0]?.length ?? 0;
  const size = bits / 8;
  const view = new DataView(new ArrayBuffer(frames * channels.length * size));
  for (let i = 0; i < frames; i += 1) {
    channels.forEach((channel, c) => {
      const at = (i * channels.length + c) * size;
      const value = channel[i] ?? 0;
      const top = 2 ** (bits - 1);
      const whole = Math.max(-top, Math.min(top - 1, Math.round(value * top)));
      if (encoding === "float") {
        if (bits === 64) view.setFloat64(at, value, true);
        else view.setFloat32(at, value, true);
      } else if (bits === 8) view.setUint8(at, whole + 128);
      else if (bits === 16) view.setInt16(at, whole, true);
      else if (bits === 32) view.setInt32(at, whole, true);
      else for (let b = 0; b < 3; b += 1) view.setUint8(at + b, (whole >> (8 * b)) & 255);
    });
  }
  return new Uint8Array(view.buffer);
}

export function wavBytes(spec: WavSpec = {}): Uint8Array {
  const { channels = [new Float64Array(0)], sampleRateHz = 48000, encoding = "int", bits = 16 } = spec;
  const tag = encoding === "int" ? 1 : 3;
  const fmt = new Uint8Array(spec.extensible === true ? 40 : 16);
  const view = new DataView(fmt.buffer);
  const frameBytes = spec.header?.frameBytes ?? (channels.length * bits) / 8;
  view.setUint16(0, spec.header?.tag ?? (spec.extensible === true ? 0xfffe : tag), true);
  view.setUint16(2, spec.header?.channels ?? channels.length, true);
  view.setUint32(4, spec.header?.rate ?? sampleRateHz, true);
  view.setUint32(8, sampleRateHz * frameBytes, true);
  view.setUint16(12, frameBytes, true);
  view.setUint16(14, spec.header?.bits ?? bits, true);
  if (spec.extensible === true) {
    view.setUint16(16, 22, true);
    view.setUint16(18, bits, true);
    view.setUint16(24, tag, true);
    fmt.set(GUID_TAIL, 26);
  }
  const data = sampleBytes(channels, encoding, bits);
  const body = join([
    text("WAVE"),
    chunk("fmt ", fmt),
    ...(spec.extra ?? []).map((one) => chunk(one.name, one.body)),
    chunk("data", data, spec.dataSize ?? data.length),
  ]);
  return chunk("RIFF", body, spec.riffSize ?? body.length);
}

/** mulberry32 (public domain). */
export function uniform(seed: number): () => number {
  let a = seed >>> 0;
  return () => {
    a = (a + 0x6d2b79f5) | 0;
    let t = a;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}

/** White noise of an rms, evenly distributed. */
export function noise(seed: number, length: number, rms: number): Float64Array {
  const next = uniform(seed);
  return Float64Array.from({ length }, () => Math.sqrt(3) * rms * (2 * next() - 1));
}

/** Adds a sine of an rms to samples; `drift` is the speed over the nominal at a time in s. */
export function addTone(
  samples: Float64Array,
  frequencyHz: number,
  rms: number,
  sampleRateHz = 48000,
  drift: (timeS: number) => number = () => 1,
): Float64Array {
  let phase = 0;
  for (let i = 0; i < samples.length; i += 1) {
    samples[i] = (samples[i] ?? 0) + Math.SQRT2 * rms * Math.sin(phase);
    phase += (2 * Math.PI * frequencyHz * drift(i / sampleRateHz)) / sampleRateHz;
  }
  return samples;
}
