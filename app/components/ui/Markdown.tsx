/**
 * A note's text. `html` must come from the server's Markdown service, which cleans it; nothing else may
 * be given here.
 */
export function Markdown({ html }: { html: string }) {
  // biome-ignore lint/security/noDangerouslySetInnerHtml: cleaned by the server before it is stored or sent
  return <div className="prose-note" dangerouslySetInnerHTML={{ __html: html }} />;
}
