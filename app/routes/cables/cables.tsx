import { Form, useNavigation } from "react-router";
import { z } from "zod";
import { requireProject } from "~/auth/require.server";
import { Button } from "~/components/ui/Button";
import { Dialog } from "~/components/ui/Dialog";
import { InputField, TextareaField } from "~/components/ui/Field";
import { type Column, Table } from "~/components/ui/Table";
import * as cables from "~/db/cables.server";
import { isDuplicate } from "~/db/client.server";
import { notFound, refused } from "~/errors";
import { CABLES } from "~/measurement/cables";
import { matchedLossDb } from "~/measurement/feedline";
import { formatDb, formatPercent } from "~/measurement/units";
import { redirectWithMessage } from "~/services/flash.server";
import type { Route } from "./+types/cables";
import { cableSchema, figuresOf } from "./cables.schema";
import { type CableErrors, refusedForm } from "./form-errors";

export const meta: Route.MetaFunction = () => [{ title: "Cables · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  const { project, may } = await requireProject(args, "project.read");
  const own = await cables.findAllByProject(project.id);
  return {
    mayEdit: may("bench.edit"),
    own: own.map(({ publicId, name, k1, k2, velocityFactor, source }) => ({
      publicId,
      name,
      k1,
      k2,
      velocityFactor,
      source,
    })),
    table: CABLES.map(({ name, k1, k2, velocityFactor, source }) => ({
      name,
      k1,
      k2,
      velocityFactor,
      source,
    })),
  };
}

export async function action(args: Route.ActionArgs) {
  const { project, person } = await requireProject(args, "bench.edit");
  if (!person) throw refused("Sign in first. Nothing was changed.");
  const form = await args.request.formData();
  const here = `/projects/${project.publicId}/cables`;
  switch (form.get("intent")) {
    case "add": {
      const parsed = cableSchema.safeParse(Object.fromEntries(form));
      if (!parsed.success) return refusedForm(z.flattenError(parsed.error).fieldErrors);
      const { name, velocityFactor, source } = parsed.data;
      const { k1, k2, points, worstRelative } = figuresOf(parsed.data);
      try {
        await cables.insert({
          projectId: project.id,
          ...{ name, k1, k2, points, source },
          velocityFactor: velocityFactor ?? 1,
          createdBy: person.id,
        });
      } catch (error) {
        if (!isDuplicate(error)) throw error;
        return refusedForm({ name: ["The project has a cable of this name: give another."] });
      }
      const fit =
        worstRelative === null ? "" : ` Its points lie within ${formatPercent(worstRelative)} of the curve.`;
      return redirectWithMessage(here, `“${name}” can be chosen as a feedline now.${fit}`);
    }
    case "delete": {
      const cable = await cables.findByPublicId(String(form.get("cable")));
      if (!cable || cable.projectId !== project.id) throw notFound("cable");
      await cables.deleteById(cable.id);
      return redirectWithMessage(
        here,
        `“${cable.name}” is no longer offered. Sweeps keep the figures they have.`,
      );
    }
    default:
      return refusedForm({
        form: ["The form asked for something this page does not do. Nothing was changed."],
      });
  }
}

export default function Cables({ loaderData, actionData }: Route.ComponentProps) {
  const { own, table, mayEdit } = loaderData;
  const errors: CableErrors = actionData?.errors ?? {};
  return (
    <div className="grid gap-8">
      <section aria-labelledby="cables" className="grid gap-3">
        <h2 id="cables" className="sweep-title">
          Cables of this project
        </h2>
        <p className="soft max-w-[72ch]">
          Feedlines that the table below lacks. Matched loss of a metre in dB is k1·√f + k2·f, f in MHz.
        </p>
        {own.length === 0 ? (
          <p className="soft">None yet{mayEdit && ": add one from the points of its sheet"}.</p>
        ) : (
          <Table
            caption="Cables of this project"
            columns={columns(mayEdit)}
            rows={own}
            rowKey={(row) => row.publicId ?? row.name}
          />
        )}
        {mayEdit && <AddForm errors={errors} />}
      </section>
      <section aria-labelledby="table" className="grid gap-3">
        <h2 id="table">The built-in table</h2>
        <Table caption="Built-in cables" columns={columns(false)} rows={table} rowKey={(row) => row.name} />
      </section>
    </div>
  );
}

interface Row {
  publicId?: string;
  name: string;
  k1: number;
  k2: number;
  velocityFactor: number;
  source: string;
}

function columns(mayDelete: boolean): Column<Row>[] {
  const loss = (mhz: number) => ({
    key: `at-${mhz}`,
    label: `dB for 100 m at ${mhz} MHz`,
    numeric: true,
    cell: ({ k1, k2 }: Row) => formatDb(matchedLossDb({ k1, k2, lengthM: 100 }, mhz * 1e6)),
  });
  const more: Column<Row>[] = mayDelete
    ? [{ key: "delete", label: "", cell: (row) => <DeleteDialog row={row} /> }]
    : [];
  return [
    { key: "name", label: "Cable", cell: (row) => <span className="font-semibold">{row.name}</span> },
    loss(10),
    loss(100),
    { key: "velocity", label: "Velocity factor", numeric: true, cell: (row) => row.velocityFactor },
    {
      key: "source",
      label: "Source",
      cell: (row) => <span className="text-small">{row.source || "not said"}</span>,
    },
    ...more,
  ];
}

function DeleteDialog({ row }: { row: Row }) {
  return (
    <Dialog label="Delete" variant="danger" size="small" title="Delete this cable?">
      <p>“{row.name}” is no longer offered. Sweeps that have it keep its figures.</p>
      <Form method="post">
        <input type="hidden" name="intent" value="delete" />
        <input type="hidden" name="cable" value={row.publicId} />
        <Button variant="danger">Delete the cable</Button>
      </Form>
    </Dialog>
  );
}

function AddForm({ errors }: { errors: CableErrors }) {
  const busy = useNavigation().formData?.get("intent") === "add";
  return (
    <details className="panel" open={Object.keys(errors).length > 0 || undefined}>
      <summary className="font-semibold cursor-pointer">Add a cable</summary>
      <Form method="post" className="grid gap-4 pt-4 max-w-[36rem]">
        <input type="hidden" name="intent" value="add" />
        <InputField label="Name" name="name" required maxLength={80} errors={errors.name} />
        <TextareaField
          label="Attenuation by its sheet"
          name="points"
          rows={4}
          placeholder={"10 2.0\n100 6.9\n400 14.5"}
          hint="One point a line: MHz, then dB for 100 m. k1 and k2 are fitted to them."
          errors={errors.points}
        />
        <div className="flex flex-wrap gap-4">
          <InputField
            label="or k1"
            name="k1"
            inputMode="decimal"
            unit="dB/m per √MHz"
            className="w-60"
            errors={errors.k1}
          />
          <InputField
            label="and k2"
            name="k2"
            inputMode="decimal"
            unit="dB/m per MHz"
            className="w-60"
            errors={errors.k2}
          />
        </div>
        <InputField
          label="Velocity factor"
          name="velocityFactor"
          inputMode="decimal"
          required
          className="w-36"
          errors={errors.velocityFactor}
        />
        <InputField
          label="Source"
          name="source"
          hint="Which sheet, or how it was measured."
          maxLength={300}
          errors={errors.source}
        />
        {errors.form && (
          <p role="alert" className="field-error">
            {errors.form[0]}
          </p>
        )}
        <div>
          <Button busy={busy}>Add the cable</Button>
        </div>
      </Form>
    </details>
  );
}
