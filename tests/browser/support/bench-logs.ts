/** Logs as three different loggers would write them; made here and not by the demo, so that nothing is told its own story. */
export interface Recorded {
  /** The file, as bytes would come from a logger. */
  csv: string;
  /** Mean of sensor − ambient over the rows that can be read, K, by plain arithmetic on what was written. */
  meanDeltaTK: number;
}

type Writer = "semicolon and comma" | "fahrenheit" | "gap and text row";

/** Park and Miller's minimal standard generator (Commun. ACM 31 (1988) 1192), and Irwin–Hall's sum of twelve. */
function noise(seed: number): () => number {
  let state = seed;
  const next = () => (state = (16_807 * state) % 2_147_483_647) / 2_147_483_647;
  return () => Array.from({ length: 12 }, next).reduce((a, b) => a + b, 0) - 6;
}

/**
 * Half an hour of a settled heater at five-second steps: the approach is over, what is left is noise of 0.04 K.
 * @param deltaTK the rise to record, K @param ambientC the room, °C
 */
export function temperatureLog(
  writer: Writer,
  { deltaTK, ambientC, seed }: { deltaTK: number; ambientC: number; seed: number },
): Recorded {
  const draw = noise(seed);
  const rows: { second: number; sensorC: number; roomC: number }[] = [];
  for (let second = 0; second <= 1800; second += 5) {
    if (writer === "gap and text row" && second > 600 && second < 660) continue;
    const roomC = Number((ambientC + 0.02 * draw()).toFixed(2));
    rows.push({ second, roomC, sensorC: Number((ambientC + deltaTK + 0.04 * draw()).toFixed(2)) });
  }
  const meanDeltaTK = rows.reduce((sum, row) => sum + row.sensorC - row.roomC, 0) / rows.length;
  const comma = (value: number) => value.toFixed(2).replace(".", ",");
  const fahrenheit = (celsius: number) => ((celsius * 9) / 5 + 32).toFixed(3);
  const clock = (second: number) =>
    [10 + Math.floor(second / 3600), Math.floor(second / 60) % 60, second % 60]
      .map((part) => String(part).padStart(2, "0"))
      .join(":");
  switch (writer) {
    case "semicolon and comma":
      return {
        meanDeltaTK,
        csv: [
          "Zeit;Block °C;Raum °C",
          ...rows.map((row) => `${clock(row.second)};${comma(row.sensorC)};${comma(row.roomC)}`),
          "",
        ].join("\r\n"),
      };
    case "fahrenheit":
      return {
        meanDeltaTK,
        csv: [
          "time (s),block (°F),ambient (°F)",
          ...rows.map((row) => `${row.second},${fahrenheit(row.sensorC)},${fahrenheit(row.roomC)}`),
          "",
        ].join("\n"),
      };
    case "gap and text row":
      return {
        meanDeltaTK,
        csv: [
          "time (s),block (°C),ambient (°C)",
          ...rows.flatMap((row, i) => [
            `${row.second},${row.sensorC.toFixed(2)},${row.roomC.toFixed(2)}`,
            ...(i === 40 ? ["door opened and closed again"] : []),
          ]),
          "",
        ].join("\n"),
      };
  }
}
