/** The first stop of the tab key: jumps over the header to the page's own content. */
export function SkipLink() {
  return (
    <a
      href="#content"
      className="sr-only z-50 rounded-md bg-pressed px-4 py-3 font-bold text-pressed-text focus:not-sr-only focus:absolute focus:top-2 focus:left-2"
    >
      Skip to the content
    </a>
  );
}
