import { useRouteLoaderData } from "react-router";
import { useLive } from "./LiveProject.tsx";
import { lookingWords } from "./words.ts";

/** Who else of the members has a page of the project open. The line keeps its height, so that nobody's coming moves the page. */
export function Looking() {
  const live = useLive();
  const root = useRouteLoaderData<{ person: { userName: string } | null }>("root");
  if (!live) return null;
  const { state, here } = live;
  const words = lookingWords(state.looking ?? [], root?.person?.userName ?? "", here);
  return (
    <p className="live-looking no-print" role="status" aria-live="polite" title={words || undefined}>
      {words && (
        <>
          <span className="live-dot" aria-hidden="true" />
          {words}
        </>
      )}
    </p>
  );
}
