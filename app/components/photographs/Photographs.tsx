import { Form, useNavigation } from "react-router";
import { Button } from "~/components/ui/Button";
import { Dialog } from "~/components/ui/Dialog";
import { InputField } from "~/components/ui/Field";
import type { ShownPhotograph } from "~/services/photographs.server";

export interface PhotographsProps {
  /** Public id of the project. */
  project: string;
  /** Public id of the bench or step that they show; neither: the antenna. */
  of?: { bench?: string; step?: string };
  photographs: ShownPhotograph[];
  mayEdit: boolean;
  /** The empty list's word for what to photograph: "the bench with its cables". */
  what: string;
}

/** Photographs as tiles with their captions; adding, captions and deletion go to the project's photographs and come back here. */
export function Photographs({ project, of = {}, photographs, mayEdit, what }: PhotographsProps) {
  const action = `/projects/${project}/photographs`;
  return (
    <section id="photographs" aria-labelledby="photographs-head" className="grid gap-3">
      <h2 id="photographs-head">Photographs</h2>
      {photographs.length === 0 && (
        <p className="soft">
          {mayEdit ? `None yet: a photograph of ${what} tells more than its description.` : "None yet."}
        </p>
      )}
      {photographs.length > 0 && (
        <ul className="photographs">
          {photographs.map((photograph) => (
            <li key={photograph.publicId}>
              <Tile {...{ photograph, action, mayEdit }} />
            </li>
          ))}
        </ul>
      )}
      {mayEdit && <AddForm action={action} of={of} />}
    </section>
  );
}

interface TileProps {
  photograph: ShownPhotograph;
  action: string;
  mayEdit: boolean;
}

function Tile({ photograph, action, mayEdit }: TileProps) {
  const { publicId, caption, name, width, height } = photograph;
  return (
    <figure className="photograph">
      <a href={`${action}/${publicId}/shown`}>
        <img
          src={`${action}/${publicId}/small`}
          alt={caption || `Photograph without a caption: ${name}`}
          width={width}
          height={height}
          loading="lazy"
        />
      </a>
      <figcaption className="grid gap-2 text-small">
        {caption ? <span>{caption}</span> : <span className="soft">No caption</span>}
        {mayEdit && (
          <span className="flex flex-wrap gap-2 no-print">
            <CaptionDialog {...{ publicId, caption, action }} />
            <DeleteDialog {...{ publicId, action }} />
          </span>
        )}
      </figcaption>
    </figure>
  );
}

function CaptionDialog({ publicId, caption, action }: { publicId: string; caption: string; action: string }) {
  return (
    <Dialog label="Caption" size="small" icon="edit" title="Caption of the photograph">
      <Form method="post" action={action} className="grid gap-4">
        <input type="hidden" name="photograph" value={publicId} />
        <InputField label="Caption" name="caption" defaultValue={caption} maxLength={300} />
        <Button name="intent" value="caption">
          Keep the caption
        </Button>
      </Form>
    </Dialog>
  );
}

function DeleteDialog({ publicId, action }: { publicId: string; action: string }) {
  return (
    <Dialog label="Delete" variant="danger" size="small" title="Delete this photograph?">
      <p className="mb-4">It goes with its original, for everybody. This can't be undone.</p>
      <Form method="post" action={action}>
        <input type="hidden" name="photograph" value={publicId} />
        <Button variant="danger" name="intent" value="delete" icon="remove">
          Delete the photograph
        </Button>
      </Form>
    </Dialog>
  );
}

function AddForm({ action, of }: { action: string; of: { bench?: string; step?: string } }) {
  const busy = useNavigation().formAction?.startsWith(action) ?? false;
  return (
    <details className="no-print">
      <summary className="button button-quiet button-small">Add photographs</summary>
      <Form
        method="post"
        action={action}
        encType="multipart/form-data"
        className="panel grid gap-4 justify-items-start mt-3 max-w-[36rem]"
      >
        {of.bench && <input type="hidden" name="bench" value={of.bench} />}
        {of.step && <input type="hidden" name="step" value={of.step} />}
        <label className="grid gap-1">
          <span className="font-semibold">Photographs</span>
          <input type="file" name="photographs" multiple required accept="image/*" />
        </label>
        <InputField
          label="Caption"
          hint="May stay empty."
          name="caption"
          maxLength={300}
          className="w-full"
        />
        <p className="field-hint">
          JPEG, PNG, WebP or AVIF, up to 30 MB each. Shown without the place and camera data they carry; the
          original keeps them, for those who may change this.
        </p>
        <Button name="intent" value="add" icon="upload" busy={busy}>
          Add
        </Button>
      </Form>
    </details>
  );
}
