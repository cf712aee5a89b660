/** How a unit is written, other spellings people type, and its line to the base unit of its kind: base = a·x + b. */
export type Unit = { symbol: string; kind: string; a: number; b: number; spellings: readonly string[] };

const unit = (kind: string, symbol: string, spellings: readonly string[] = [], a = 1, b = 0): Unit => ({
  symbol,
  kind,
  a,
  b,
  spellings,
});

/**
 * Exact factors: 1 in = 25.4 mm and t/°F = 9/5 t/°C + 32 (NIST SP 811 (2008), B.8). A temperature difference in K is
 * a kind of its own, so that a reading in °C never passes for one.
 */
export const knownUnits: readonly Unit[] = [
  unit("temperature", "°C", ["c", "degc", "deg c", "celsius", "º c", "ºc", "℃"]),
  unit("temperature", "°F", ["f", "degf", "deg f", "fahrenheit", "ºf", "℉"], 5 / 9, -160 / 9),
  unit("difference", "K", ["kelvin"]),
  unit("length", "mm", ["millimetre", "millimeter"]),
  unit("length", "cm", [], 10),
  unit("length", "in", ["inch", "inches", '"', "″"], 25.4),
  unit("length", "µm", ["um", "μm"], 0.001),
  unit("level", "dB(A)", ["dba", "db a", "db(a)"]),
  unit("decibel", "dB", ["db"]),
  unit("speed", "rpm", ["1/min", "min-1", "min⁻¹", "r/min"]),
  unit("power", "W", ["watt", "watts"]),
  unit("mass", "g", ["gram", "grams"]),
  unit("mass", "kg", [], 1000),
  unit("mass", "mg", [], 0.001),
  unit("time", "s", ["sec", "seconds"]),
  unit("time", "min", ["minutes"], 60),
  unit("time", "h", ["hours"], 3600),
  unit("pressure", "Pa", []),
  unit("pressure", "hPa", ["mbar"], 100),
  unit("pressure", "kPa", [], 1000),
  unit("ratio", "%", ["percent", "% rh", "%rh"]),
  unit("angle", "°", ["deg", "degrees"]),
  unit("frequency", "Hz", ["hertz"]),
  unit("frequency", "kHz", [], 1000),
  unit("voltage", "V", ["volt", "volts"]),
  unit("current", "A", ["amp", "amps", "ampere"]),
  unit("current", "mA", [], 0.001),
];

/** The unit of that exact symbol, or undefined. */
export function unitBySymbol(symbol: string): Unit | undefined {
  return knownUnits.find((known) => known.symbol === symbol);
}

/** Exact symbol first (mA is not MA), then spellings in any case; units of the wanted kind go first. Or undefined. */
export function unitAsTyped(text: string, wantedKind?: string): Unit | undefined {
  const typed = text.trim();
  const low = typed.toLowerCase().replace(/\.$/, "");
  const fits = (known: Unit) => known.symbol === typed || known.spellings.includes(low);
  return knownUnits.find((known) => known.kind === wantedKind && fits(known)) ?? knownUnits.find(fits);
}

/** A value from one unit to another of the same kind. Throws a RangeError when either is unknown or the kinds differ. */
export function convertUnit(value: number, from: string, to: string): number {
  if (from === to) return value;
  const [source, target] = [unitBySymbol(from), unitBySymbol(to)];
  if (!source || !target || source.kind !== target.kind) throw new RangeError(`No way from ${from} to ${to}`);
  return (source.a * value + source.b - target.b) / target.a;
}
