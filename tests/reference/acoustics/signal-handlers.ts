import { findTones } from "@/lib/science/acoustics/found-tones";
import { thirdOctave } from "@/lib/science/acoustics/bands";
import { bandPower } from "@/lib/science/acoustics/spectrum-levels";
import { welch, type Spectrum } from "@/lib/science/acoustics/welch";
import { decodeFrames } from "@/lib/science/acoustics/wav-samples";
import { windowMetrics, windowSamples, type WindowName } from "@/lib/science/acoustics/windows";
import { weightingPower } from "@/lib/science/acoustics/weighting";
import { mulberry32, whiteNoise, type Handlers, type Inputs } from "./handler";

const lg = (power: number) => 10 * Math.log10(power);
const present = (spectrum: Spectrum | undefined): Spectrum => {
  if (spectrum === undefined) throw new Error("no spectrum");
  return spectrum;
};

function welchBands(i: Inputs) {
  const samples = whiteNoise(i.n("seed"), i.n("N"));
  const spectrum = present(
    welch(samples, { sampleRateHz: i.n("fs_Hz"), blockLength: i.n("nperseg"), detrend: "none" }),
  );
  const at = (x: number) => {
    const { lowerHz, upperHz } = thirdOctave(x);
    let centred = 0;
    spectrum.psd.forEach((line, k) => {
      const hz = k * spectrum.spacingHz;
      if (hz >= lowerHz && hz < upperHz) centred += line * spectrum.spacingHz;
    });
    return {
      fractional_dB_re_1: lg(bandPower(spectrum, lowerHz, upperHz)),
      binCentre_dB_re_1: lg(centred),
      theory_white_dB: lg((upperHz - lowerHz) / (3 * (i.n("fs_Hz") / 2))),
    };
  };
  return { "500": at(-3), "1000": at(0), "2000": at(3), "4000": at(6), "8000": at(9) };
}

function welchSine(i: Inputs) {
  const amplitude = Math.SQRT2 * 20e-6 * 10 ** (i.n("L_dB") / 20);
  const samples = Float64Array.from(
    { length: i.n("N") },
    (_, k) => amplitude * Math.sin((2 * Math.PI * i.n("f_Hz") * k) / 48000),
  );
  const spectrum = present(welch(samples, { sampleRateHz: 48000, blockLength: 8192, detrend: "none" }));
  const db = (power: number) => lg(power / 4e-10);
  const { lowerHz, upperHz } = thirdOctave(0);
  // A single line's amplitude takes the coherent gain, so its density times spacing and noise bandwidth (1.5 for Hann).
  const { noiseBandwidthLines } = windowMetrics(windowSamples("hann", 8192));
  const peak = spectrum.psd.reduce((top, line) => Math.max(top, line), 0);
  return {
    totalFromPSD_dB: db(bandPower(spectrum, 0, Infinity)),
    band1k_dB: db(bandPower(spectrum, lowerHz, upperHz)),
    peakLine_amplitudeScaled_dB: db(peak * spectrum.spacingHz * noiseBandwidthLines),
  };
}

/** The comb is exact by construction: its lines are summed as a spectrum of 1 Hz lines. */
function pinkComb(i: Inputs) {
  const psd = new Float64Array(24001);
  const frequencies: number[] = [];
  const power = 4e-10 * 10 ** ((i.n("L_band_dB") - lg(8)) / 10);
  const bands = Array.from({ length: 21 }, (_, k) => thirdOctave(k - 10));
  for (const { lowerHz, upperHz } of bands) {
    for (let k = 0; k < 8; k += 1) {
      const hz = Math.round(lowerHz + ((k + 0.5) / 8) * (upperHz - lowerHz));
      frequencies.push(hz);
      psd[hz] = power;
    }
  }
  const spectrum = { spacingHz: 1, psd, blocks: 1 };
  const each = bands.map(({ lowerHz, upperHz }) => lg(bandPower(spectrum, lowerHz, upperHz) / 4e-10));
  const total = bandPower(spectrum, 10, 20000);
  const weighted = frequencies.reduce((sum, hz) => sum + power * weightingPower("A", hz), 0);
  return {
    each_band_dB: each.reduce((sum, level) => sum + level, 0) / each.length,
    LZ_dB: lg(total / 4e-10),
    LA_dB: lg(weighted / 4e-10),
    rms_Pa: Math.sqrt(total),
    first_freqs_Hz: frequencies.slice(0, 8),
    last_freqs_Hz: frequencies.slice(-8),
  };
}

/** The whole chain on noise with a tone. Lines are 1.46 Hz apart here, 1 Hz in the source; the tolerance covers it. */
function toneInNoise(i: Inputs) {
  const noise = whiteNoise(i.n("seed"), i.n("N"));
  const samples = noise.map(
    (u, k) => i.n("A") * Math.sin((2 * Math.PI * i.n("ft_Hz") * k) / 48000) + i.n("sigma") * Math.sqrt(3) * u,
  );
  const tones = findTones(present(welch(samples, { sampleRateHz: 48000, blockLength: 32768 })));
  const tone = tones.find(({ frequencyHz }) => Math.abs(frequencyHz - i.n("ft_Hz")) < 1);
  return {
    TNR_analytic_dB: tone?.toneToNoiseDb,
    PR_analytic_dB: tone?.prominenceDb,
    TNR_reference_impl_dB: tone?.toneToNoiseDb,
    PR_reference_impl_dB: tone?.prominenceDb,
  };
}

function pcmToFloat(i: Inputs) {
  const bits = i.n("bits");
  const samples = i.list("samples");
  const bytes = new Uint8Array((samples.length * bits) / 8);
  samples.forEach((sample, at) => {
    for (let b = 0; b < bits / 8; b += 1) bytes[(at * bits) / 8 + b] = (sample >> (8 * b)) & 255;
  });
  const out = new Float64Array(samples.length);
  const format = { sampleRateHz: 48000, channels: 1, encoding: "int" as const, bits, frameBytes: bits / 8 };
  decodeFrames(bytes, samples.length, format, 0, out);
  return [...out];
}

export const signalHandlers: Handlers = {
  mulberry32: (i) => {
    const next = mulberry32(i.n("seed"));
    return Array.from({ length: i.n("n") }, () => next());
  },
  rms: (i) => {
    const noise = whiteNoise(i.n("seed"), i.n("N"));
    const square = noise.reduce((sum, value) => sum + value * value, 0) / noise.length;
    return { rms: Math.sqrt(square), dB_re_1: lg(square), theory_dB: lg(1 / 3) };
  },
  pcmToFloat,
  windowMetrics: (i) => {
    const metrics = windowMetrics(windowSamples(i.text("window") as WindowName, i.n("N")));
    return {
      coherentGain: metrics.coherentGain,
      meanSquare: metrics.meanSquare,
      ENBW_bins: metrics.noiseBandwidthLines,
      amplitudeCorrection: 1 / metrics.coherentGain,
      energyCorrection: 1 / Math.sqrt(metrics.meanSquare),
    };
  },
  welchBands,
  welchSine,
  pinkComb,
  tnrPrFromSignal: toneInNoise,
};
