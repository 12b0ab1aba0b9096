/** The dash of a figure that is not there; the reason is read out and stands in the tooltip. */
export function Missing({ reason }: { reason: string }) {
  return (
    <span className="num text-muted" title={reason}>
      <span aria-hidden="true">–</span>
      <span className="sr-only">none: {reason}</span>
    </span>
  );
}
