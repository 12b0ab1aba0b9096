/** First stop of the Tab key: past the header. */
export function SkipLink() {
  return (
    <a
      href="#main"
      className="bg-ink text-paper sr-only font-semibold focus:not-sr-only focus:absolute focus:top-2 focus:left-2 focus:z-50 focus:px-4 focus:py-3"
    >
      Skip to the content
    </a>
  );
}
