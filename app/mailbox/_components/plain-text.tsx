/** Text as it is, with its web addresses as links. Nothing in it is read as markup. */
export function PlainText({ text }: { text: string }) {
  const parts = text.split(/(https?:\/\/[^\s<>"]+)/g);
  return (
    <div className="break-words whitespace-pre-wrap">
      {parts.map((part, index) =>
        /^https?:\/\//.test(part) ? (
          <a key={index} href={part} className="break-all text-link">
            {part}
          </a>
        ) : (
          part
        ),
      )}
    </div>
  );
}
