import { Link } from "react-router";
import { Table } from "~/components/ui/Table";
import { VerdictTag } from "~/components/ui/Tag";
import type { ProjectPageData } from "../project-page.server.ts";

type Trail = ProjectPageData["trails"][number];

/** The map's trails as numbers. */
export function TrailTable({ data }: { data: ProjectPageData }) {
  const { trails, project } = data;
  if (trails.length === 0) {
    return (
      <p className="soft">
        None yet. A trail is one dip followed from sweep to sweep; it begins with the second sweep that shows
        the dip.
      </p>
    );
  }
  return (
    <Table<Trail>
      caption="Trails, lowest frequency first"
      rows={trails}
      rowKey={({ publicId }) => publicId}
      columns={[
        {
          key: "trail",
          label: "Trail",
          cell: ({ publicId, name, frequency }) => (
            <Link
              to={`/projects/${project.publicId}/trails/${publicId}`}
              className={name ? undefined : "font-mono"}
            >
              {name || frequency}
            </Link>
          ),
        },
        { key: "frequency", label: "Last at", numeric: true, cell: ({ frequency }) => frequency },
        { key: "swr", label: "Lowest SWR", numeric: true, cell: ({ swr }) => swr },
        {
          key: "movement",
          label: "Moved",
          cell: ({ movement, stops }) => movement || (stops > 1 ? "not beyond its limits" : ""),
        },
        { key: "stops", label: "Sweeps", numeric: true, cell: ({ stops }) => stops },
        {
          key: "verdict",
          label: "Verdict",
          cell: ({ verdict, verdictText }) => (
            <span className="inline-flex flex-wrap items-baseline gap-2">
              <VerdictTag verdict={verdict} />
              {verdictText}
            </span>
          ),
        },
      ]}
    />
  );
}
