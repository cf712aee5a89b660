import type { ReactNode } from "react";
import { SearchBlank } from "./search-blank";
import { publicWords, type StripWord } from "./public-words";
import { StripWords } from "./strip-words";
import { Wordmark } from "./wordmark";

export type StripProps = {
  /** Words after the public ones, such as an operator's "Bench". */
  moreWords?: readonly StripWord[];
  /** Sign in, or the account's menu. */
  account: ReactNode;
};

/** The strip torn off the sheet's top, on the same paper. */
export function Strip({ moreWords = [], account }: StripProps) {
  return (
    <header className="section holes strip">
      <Wordmark />
      <StripWords words={[...publicWords, ...moreWords]} />
      <SearchBlank />
      <div className="strip-account">{account}</div>
    </header>
  );
}

/** First stop of the Tab key: past the strip, to what the page is about. */
export function SkipLink() {
  return (
    <a href="#main" className="skip-link">
      Skip to the page
    </a>
  );
}
