/** A letter's plain text, with the addresses in it as links. */
export function LetterText({ text }: { text: string }) {
  const parts = text.split(/(https?:\/\/[^\s<>"]+)/);
  return (
    <p className="mt-2 max-w-2xl wrap-anywhere whitespace-pre-wrap">
      {parts.map((part, index) =>
        index % 2 === 1 ? (
          <a key={index} href={part} rel="noreferrer">
            {part}
          </a>
        ) : (
          part
        ),
      )}
    </p>
  );
}
