/** First stop of the Tab key: past the navigation. */
export function SkipLink() {
  return (
    <a
      href="#content"
      className="sr-only z-50 rounded-control bg-ink px-4 py-3 font-bold text-paper focus:not-sr-only focus:fixed! focus:top-3 focus:left-3"
    >
      Skip to the content
    </a>
  );
}
