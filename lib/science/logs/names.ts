import { plain, type Quantity } from "./units";

/** Word stems in the languages that loggers speak; matched in the normalised name. */
const STEMS: readonly (readonly [Quantity, RegExp])[] = [
  ["time", /\btemps\b/u],
  ["temperature-difference", /Δ|δ|\bdelta|\bdt\b|temp\w*[ _-]?(diff|rise)|differenz|erwärmung|温升|温度差/u],
  [
    "speed",
    /rpm|drehzahl|\bspeed|tacho|vitesse|velocidad|velocit|toerental|obrot|otáčk|оборот|回転|转速|轉速|회전|varvtal|omdrejning|devir/u,
  ],
  [
    "level",
    /l[abcz]?eq\b|\bl[abcz][fsi]?[ _]?(max|min|pk|peak|e)?\d*\b|\bla[fsi]?\d|laf|las\b|\bspl\b|level|pegel|schall|niveau|nivel|livell|noise|sound|bruit|ruido|ruído|rumor|geluid|lyd|ljud|hałas|poziom|hluk|hladina|шум|звук|уров|騒音|音圧|噪|声级|聲|소음|\bdb[abcz]?\b|gürültü|melu|zaj/u,
  ],
  ["humidity", /humid|feucht|\brh\b|humedad|vochtig|wilgot|влажн|湿度|濕度|습도/u],
  ["pressure", /pressure|luftdruck|pression|presión|давлен|気圧|气压/u],
  ["power", /power|leistung|puissance|potencia|potenza|vermogen|\bmoc\b|мощн|電力|功率/u],
  ["voltage", /voltage|spannung|tension|напряж|電圧|电压/u],
  ["current", /\bcurrent|\bstrom|courant|corriente|電流|电流/u],
  [
    "temperature",
    /^t ?(amb|air|in|out|room|sink|core|base|hot|hs|a|s|h|u|k)\d*\b|temp|°|celsius|fahrenheit|\bt[ _]?\d+\b|\bt |lämpö|hőm|teplo|темп|温度|溫度|온도|sıcak|حرارة|ambi[ae]nt|\bamb\b|umgebung|\bcpu\b|cooler|\binlet|\broom|heat ?sink|kühl|sensor|capteur|sonde|sonda|fühler|føler|givare|czujnik|anturi|thermo|датчик|センサ|传感|室温|環境|环境/u,
  ],
  [
    "time",
    /time|zeit|\btemps\b|tiempo|tempo\b|\btid|\btijd|czas|\baika|\bčas|\bcas\b|время|時間|时间|時刻|時間|시간|זמן|وقت|زمن|\bidő|zaman|timestamp|\bdate|datum|fecha|\bdata\b|elapsed|uhrzeit|heure|\bhora|\bora\b|klok|clock|secon|sekund|laufzeit|경과|経過/u,
  ],
];

const AMBIENT =
  /^t ?(a|u|in)\b|amb|umgebung|raum|room|inlet|intake|ansaug|zuluft|\bin\b|omgev|omgiv|omgivelse|otocz|okol|prostř|окруж|воздух|комнат|環境|室温|周囲|外気|吸気|环境|室内|주변|실온|ortam|ympärist|környezet|pièce|sala\b|\baire?\b|\bluft\b|lucht|powietr/u;
const SENSOR =
  /^t ?(s|h|hs|k)\b|sensor|heat ?sink|sink|cooler|core|\bcpu\b|base|block|plate|heater|\bhot\b|fühler|kühl|kuehl|heiz|sonde|capteur|sonda|czujnik|датчик|センサ|ヒート|传感|散热|센서|anturi|radiat|радиатор|diss?ip|kylfl|source|quelle|føler|givare|koel|chauff|calent/u;

/** Underscores and camel case as spaces, so that word limits are found. */
function spaced(name: string): string {
  return plain(name.replace(/(\p{Ll})(\p{Lu})/gu, "$1 $2").replace(/[_]+/g, " "));
}

/** The quantity that a column's name speaks of; undefined when it says nothing known. */
export function quantityOfName(name: string): Quantity | undefined {
  const text = spaced(name);
  return STEMS.find(([, stem]) => stem.test(text))?.[0];
}

/** Whether a temperature's name speaks of the air around, or of the heated part; undefined when of neither. */
export function roleOfName(name: string): "sensor" | "ambient" | undefined {
  const text = spaced(name);
  if (AMBIENT.test(text)) return "ambient";
  return SENSOR.test(text) ? "sensor" : undefined;
}

/** Whether a name means a rise and not a temperature. */
export function isDifference(name: string): boolean {
  return quantityOfName(name) === "temperature-difference";
}
