import { Fragment } from "react";

/** A path that breaks before its slashes where a line ends. */
export function Path({ path }: { path: string }) {
  return path.split("/").map((part, i) => (
    // biome-ignore lint/suspicious/noArrayIndexKey: a fixed text; the same part may be in it twice
    <Fragment key={`${i} ${part}`}>
      {i > 0 && (
        <>
          <wbr />/
        </>
      )}
      {part}
    </Fragment>
  ));
}
