import { isoWithOffset, formatDateTime } from "@/lib/display/format-time";

type Message = {
  readonly recipient: string;
  readonly subject: string;
  readonly body: string;
  readonly sent: boolean;
  readonly createdAtMs: number;
};

const LINK = /(https?:\/\/\S+)/;

/** Links lead to this server, under whatever address it is being looked at. */
function localHref(text: string): string {
  const url = new URL(text);
  return url.pathname + url.search;
}

export function OutboxMessage({ message }: { message: Message }) {
  return (
    <li className="rule-hair py-4">
      <h2 className="text-lg">{message.subject}</h2>
      <p className="text-muted text-sm break-words">
        To {message.recipient},{" "}
        <time dateTime={isoWithOffset(message.createdAtMs, "UTC")}>
          {formatDateTime(message.createdAtMs, "UTC")} UTC
        </time>
        , {message.sent ? "sent" : "not sent"}
      </p>
      {message.body === "" ? (
        <p className="text-muted mt-2">The text is not kept once a message is sent.</p>
      ) : (
        <p className="mt-2 max-w-2xl break-words whitespace-pre-wrap">
          {message.body.split(LINK).map((piece, index) =>
            LINK.test(piece) ? (
              <a key={index} href={localHref(piece)} className="link">
                {piece}
              </a>
            ) : (
              piece
            ),
          )}
        </p>
      )}
    </li>
  );
}
