/** Under every table of bands: whose edges these are, and who decides. */
export function NationalLimits({ region, limit }: { region: number | null; limit: number }) {
  return (
    <p className="text-small soft max-w-[72ch]">
      Allocations{" "}
      {region === null
        ? "as the union of the three ITU regions: the project does not say its own"
        : `of ITU region ${region}`}
      , with an SWR limit of {limit}:1; design bands with their own. National limits differ, and only they and
      your licence decide where you may transmit.
    </p>
  );
}
