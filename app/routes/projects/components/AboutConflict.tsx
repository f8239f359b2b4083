import { type Conflict, EditConflict } from "~/components/edit-conflict/EditConflict";
import { ITU_REGIONS } from "../project.schema.ts";

/** In the place of the form about the project, where two people changed the same of it. */
export function AboutConflict({ conflict }: { conflict: Conflict }) {
  return (
    <section className="space-y-3">
      <h2>About</h2>
      <EditConflict
        key={conflict.was}
        intent="about"
        conflict={conflict}
        labels={{
          title: "Title",
          summary: "What it is about",
          visibility: "Who can read it",
          ituRegion: "ITU region",
        }}
        words={{ ituRegion: (region) => ITU_REGIONS.find(({ value }) => value === region)?.label ?? region }}
      />
    </section>
  );
}
