import "./screen-view.css";
import Link from "next/link";
import type { Round, Standing } from "@/lib/contracts/seasons";
import { formatDate } from "@/lib/format/dates";
import { formatNumber } from "@/lib/format/numbers";
import { formatRank } from "@/lib/format/ranks";
import { RankRange } from "./rank-range";
import { seasonLevelUnit } from "./season-list";
import { chance, scoreOf, scoreUnit } from "./standing-table";

/** As many lines as can be read off a recording. */
const linesMost = 12;

function Lines({ standing }: { standing: Standing }) {
  const ranked = standing.rows.filter((row) => row.rank !== null);
  return (
    <table>
      <caption className="sr-only">The first {Math.min(linesMost, ranked.length)} of the round</caption>
      <thead>
        <tr>
          <th scope="col">Rank</th>
          <th scope="col">Design</th>
          <th scope="col">By</th>
          <th scope="col" className="is-figure">
            Score, {scoreUnit(standing)}
          </th>
          <th scope="col">95 % range</th>
          <th scope="col" className="is-figure">
            Chance of first
          </th>
        </tr>
      </thead>
      <tbody>
        {ranked.slice(0, linesMost).map((row) => (
          <tr key={row.entryId}>
            <td className="figures">{formatRank(row.rank ?? 1)}</td>
            <th scope="row">
              {row.name} {row.letter}
            </th>
            <td>{row.designers.join(", ")}</td>
            <td className="is-figure">{row.score === null ? "–" : scoreOf(standing, row.score)}</td>
            <td>
              <RankRange rank={row.rank ?? 1} low={row.rankLow ?? 1} high={row.rankHigh ?? 1} of={ranked.length} />
            </td>
            <td className="is-figure">{chance(row.pFirst)}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}

/** A round's standing on one 16:9 picture, for recording; the way back is a link in its foot. */
export function ScreenView({ round, back }: { round: Round; back: string }) {
  const { standing, season } = round;
  return (
    <div className="screen-view">
      <div className="screen-frame">
        <div className="screen-page">
          <header>
            <h1>
              {season.title}, round {round.number}
            </h1>
            <p>
              Published {formatDate(round.publishedAt)} · {standing?.rule.label} at{" "}
              {round.levelsDba.map((level) => formatNumber(level)).join(", ")} {seasonLevelUnit(round)}
            </p>
          </header>
          {standing ? <Lines standing={standing} /> : <p>No standing yet.</p>}
          <p className="screen-foot">
            {standing ? `${standing.rule.formula}; ${standing.rule.better} is better. ` : ""}Ranges hold 95 of 100
            simulated rounds. <Link href={back}>The whole round</Link>
          </p>
        </div>
      </div>
    </div>
  );
}
