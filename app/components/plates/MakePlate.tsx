import { useRouteLoaderData } from "react-router";
import { LinkButton } from "~/components/ui/Button";

/** Of what every page of a project knows: whether this person makes plates there. */
export interface PlatesOfProject {
  project: { id: string };
  mayPlate: boolean;
}

export interface MakePlateProps {
  /** What it is of: "sweep:ID", "dip:ID", "compare:ID,ID", "trail:ID", "strip" or "bench:ID". */
  from: string;
  /** As it is seen now; what is left out is as the plate's form proposes. */
  view?: {
    quantity?: "rl" | "swr";
    scale?: "linear" | "log" | null;
    fromHz?: number | null;
    toHz?: number | null;
  };
}

/** The way to a plate of what a page of a project shows; nothing for who may not make one there. */
export function MakePlate({ from, view = {} }: MakePlateProps) {
  const project = useRouteLoaderData<PlatesOfProject>("routes/projects/layout");
  if (!project?.mayPlate) return null;
  const address = new URLSearchParams({ from });
  if (view.quantity === "swr") address.set("view", "swr");
  if (view.scale) address.set("axis", view.scale);
  if (view.fromHz != null) address.set("low", megahertz(view.fromHz));
  if (view.toHz != null) address.set("high", megahertz(view.toHz));
  return (
    <LinkButton
      to={`/projects/${project.project.id}/plates/new?${address}`}
      variant="quiet"
      size="small"
      icon="plate"
      className="no-print"
    >
      Make a plate
    </LinkButton>
  );
}

/** MHz to the hertz and no trailing zeros. */
function megahertz(hz: number): string {
  return String(Number((hz / 1e6).toFixed(6)));
}
