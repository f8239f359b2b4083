/** A text of code that scrolls by itself. */
export function Code({ label, text }: { label: string; text: string }) {
  return (
    // biome-ignore lint/a11y/noNoninteractiveTabindex: what scrolls must be reachable by keyboard
    <section className="api-code" aria-label={label} tabIndex={0}>
      <pre>{text}</pre>
    </section>
  );
}
