const ADDRESS = /(https?:\/\/[^\s<>]+)/;

/** The text of a mail as it was sent, its links made to follow. */
export function MailText({ text }: { text: string }) {
  return (
    <div className="mt-2 max-w-prose break-words whitespace-pre-wrap">
      {text.split(ADDRESS).map((part, index) =>
        ADDRESS.test(part) ? (
          <a key={index} href={part} className="link break-all">
            {part}
          </a>
        ) : (
          part
        ),
      )}
    </div>
  );
}
