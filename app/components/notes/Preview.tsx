import { useState } from "react";
import { useFetcher } from "react-router";
import { Button } from "~/components/ui/Button";
import { useHydrated } from "~/components/ui/hydrated";
import { Markdown } from "~/components/ui/Markdown";

/** How the text will look, drawn by the server as every note is; asked for, and again when the text is another. */
export function Preview({ text, projectId }: { text: string; projectId: string }) {
  const fetcher = useFetcher<{ html: string }>();
  const hydrated = useHydrated();
  const [shown, setShown] = useState<string | null>(null);
  if (!hydrated || text.trim() === "") return null;
  const ask = () => {
    setShown(text);
    fetcher.submit({ body: text, project: projectId }, { method: "post", action: "/notes/preview" });
  };
  const current = shown === text;
  return (
    <div className="grid gap-2 justify-items-start">
      <Button
        type="button"
        variant="quiet"
        size="small"
        aria-expanded={shown !== null}
        busy={fetcher.state !== "idle"}
        onClick={current ? () => setShown(null) : ask}
      >
        {shown === null ? "Preview" : current ? "Close the preview" : "Preview the changed text"}
      </Button>
      {shown !== null && fetcher.data && (
        <section
          aria-label="Preview"
          aria-live="polite"
          className={`w-full border border-dashed border-edge rounded-base p-3 ${current ? "" : "opacity-60"}`}
        >
          <Markdown html={fetcher.data.html} />
        </section>
      )}
    </div>
  );
}
