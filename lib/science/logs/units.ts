/** What a column holds. Null where neither its name nor its unit tells. */
export type Quantity =
  | "time"
  | "temperature"
  | "temperature-difference"
  | "level"
  | "speed"
  | "power"
  | "voltage"
  | "current"
  | "humidity"
  | "pressure";

/** A unit as written in logs; base = (value + offset) × scale, in s, °C, dB, rpm, W, V, A, %, Pa. */
export interface Unit {
  readonly quantity: Quantity;
  readonly symbol: string;
  readonly scale: number;
  readonly offset: number;
}

const unit = (quantity: Quantity, symbol: string, spellings: string, scale = 1, offset = 0) => ({
  spellings: spellings.split(" "),
  unit: { quantity, symbol, scale, offset },
});

/** Spellings are compared in lower case, without spaces, after compatibility normalisation (℃ is °c). */
const TABLE = [
  unit(
    "temperature",
    "°C",
    "°c degc deg.c celsius centigrade gradc gradcelsius degreescelsius degreec °celsius oc с° °с ?c \ufffdc",
  ),
  unit("temperature", "°F", "°f degf deg.f fahrenheit gradf degreesfahrenheit °fahrenheit of ?f \ufffdf", 5 / 9, -32),
  unit("temperature", "K", "kelvin °k degk", 1, -273.15),
  unit(
    "time",
    "s",
    "sec secs second seconds sek sekunde sekunden seg segundo segundos seconde secondes secondi сек секунд 秒 초 sn saniye",
  ),
  unit("time", "min", "min mins minute minutes minuten minuto minutos minuti мин минут 分 분 dk dakika", 60),
  unit("time", "ms", "ms msec msecs millisecond milliseconds millis мс 毫秒 ミリ秒", 1e-3),
  unit("time", "µs", "µs us usec microseconds мкс", 1e-6),
  unit("time", "h", "h hr hrs hour hours std stunde stunden heures ore horas час 小时", 3600),
  unit("time", "d", "days tage jours", 86_400),
  unit("level", "dB(A)", "db(a) dba dba) db_a db[a] dbaspl dbа дб(а) дба db(a)spl"),
  unit("level", "dB(C)", "db(c) dbc дб(с)"),
  unit("level", "dB(Z)", "db(z) dbz db(lin) dblin"),
  unit("level", "dB", "db dbspl дб decibel decibels デシベル 分贝"),
  unit("speed", "rpm", "rpm r/min 1/min min-1 min^-1 u/min tr/min об/мин rev/min revs/min omw/min t/min 转/分 回転/分"),
  unit("power", "W", "w watt watts вт"),
  unit("voltage", "V", "v volt volts"),
  unit("current", "A", "a amp amps ampere"),
  unit("humidity", "%", "%rh %rf rh% %hr %r.h."),
  unit("pressure", "Pa", "pa"),
  unit("pressure", "hPa", "hpa mbar", 100),
] as const;

/** Single letters count only where they stand apart (brackets, underscore, a row of units). */
const LETTERS = [
  unit("temperature", "°C", "c", 1),
  unit("temperature", "°F", "f", 5 / 9, -32),
  unit("temperature", "K", "k к", 1, -273.15),
  unit("time", "s", "s с", 1),
] as const;

/** Lower case, one kind of degree sign and space, compatibility forms folded. */
export function plain(text: string): string {
  return text.replace(/[˚º]/g, "°").normalize("NFKC").replace(/μ/g, "µ").toLowerCase().trim();
}

/** The unit that a whole text spells; `alone` allows the single letters c, f, k, s. Undefined for none. */
export function unitOf(text: string, alone: boolean): Unit | undefined {
  const spelt = plain(text).replace(/\s+/g, "");
  if (spelt === "") return undefined;
  const found = TABLE.find(({ spellings }) => spellings.includes(spelt));
  if (found && (alone || spelt.length > 1)) return found.unit;
  return alone ? LETTERS.find(({ spellings }) => spellings.includes(spelt))?.unit : undefined;
}

/** The unit in a column's name: in brackets, after a slash or comma, or as its last word ("sensor_degC", "timeMs"). */
export function unitInName(name: string): Unit | undefined {
  const spaced = name.replace(/(\p{Ll})(\p{Lu})/gu, "$1_$2").replace(/d_B(?!\p{Ll})/gu, "dB");
  const words = spaced.split(/[\s_,;:]+|\/(?!min|分)/u).filter((word) => word !== "");
  const last = words[words.length - 1] ?? "";
  const whole = unitOf(last, false) ?? (words.length > 1 ? unitOf(words.slice(-2).join(""), false) : undefined);
  if (whole) return whole;
  const bracketed = /[([<{]\s*(.+?)\s*[)\]>}]\s*$/.exec(name)?.[1];
  const inner = bracketed === undefined ? undefined : unitOf(bracketed, true);
  if (inner) return inner;
  if (words.length < 2) return unitOf(name, true);
  const apart = /[_/,]\s*\S+$|\p{Ll}\p{Lu}$/u.test(name);
  return unitOf(last, apart);
}

/** A unit by its own symbol ("°F", "dB(A)", "ms"), as a person confirms it. Undefined for an unknown one. */
export function unitBySymbol(symbol: string): Unit | undefined {
  return TABLE.find((entry) => entry.unit.symbol === symbol)?.unit;
}
