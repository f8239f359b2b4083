import { useDropzone } from "react-dropzone";
import { Link } from "react-router";
import { Button } from "~/components/ui/Button";
import { Icon } from "~/components/ui/Icon";
import { PictureStages } from "./picture/PictureStages";
import { ResultLine } from "./UploadResults";
import { type Upload, useUploads } from "./use-uploads";

/** Many files at once, each with its own progress and result. */
export function DropZone({ action, fields }: { action: string; fields: Record<string, string> }) {
  const { uploads, add, retry, cancel } = useUploads(action, fields);
  const { getRootProps, getInputProps, isDragActive, open } = useDropzone({
    onDrop: (files) => add(files),
    noClick: true,
    noKeyboard: true,
  });
  const done = uploads.filter((upload) => upload.state === "done").length;
  return (
    <div className="grid gap-4">
      <div
        {...getRootProps()}
        className={`drop-zone ${isDragActive ? "drop-zone-over" : ""}`}
        data-testid="drop-zone"
      >
        <input {...getInputProps({ name: "files", "aria-label": "Sweep files" })} />
        <Icon name="upload" size={28} />
        <p className="font-semibold">{isDragActive ? "Let go to send" : "Drop sweep files here"}</p>
        <Button type="button" variant="quiet" onClick={open}>
          Choose files
        </Button>
      </div>
      {uploads.length > 0 && (
        <>
          <p role="status" className="text-small soft">
            {done} of {uploads.length} {uploads.length === 1 ? "file" : "files"} done
            {done === uploads.length && (
              <>
                . <Link to={action.replace(/\/upload$/, "")}>See them among all sweeps</Link>
              </>
            )}
          </p>
          <ul className="grid gap-2" aria-label="Files">
            {uploads.map((upload) => (
              <li key={upload.id} className="panel">
                <UploadLine
                  upload={upload}
                  onRetry={() => retry(upload.id)}
                  onCancel={() => cancel(upload.id)}
                />
              </li>
            ))}
          </ul>
        </>
      )}
    </div>
  );
}

function UploadLine({
  upload,
  onRetry,
  onCancel,
}: {
  upload: Upload;
  onRetry: () => void;
  onCancel: () => void;
}) {
  if (upload.state === "done") return <ResultLine result={upload.result} />;
  const words = {
    waiting: "Waiting its turn",
    sending: `Sending, ${Math.round(upload.sent * 100)} %`,
    reading: "Sent; being read",
    failed: upload.state === "failed" ? upload.message : "",
  }[upload.state];
  return (
    <div className="grid gap-2">
      <div className="flex flex-wrap items-center justify-between gap-2">
        <p className="min-w-0 break-words font-semibold">{upload.file.name}</p>
        {upload.state === "failed" ? (
          <Button type="button" size="small" onClick={onRetry}>
            Send again
          </Button>
        ) : (
          <Button type="button" variant="quiet" size="small" onClick={onCancel}>
            Stop
          </Button>
        )}
      </div>
      {upload.state !== "failed" && (
        <progress
          className="progress"
          max={1}
          value={upload.state === "reading" ? undefined : upload.sent}
          aria-label={`Progress of ${upload.file.name}`}
        />
      )}
      {upload.stage && <PictureStages done={upload.stage} />}
      <p className={`text-small ${upload.state === "failed" ? "text-alarm" : "soft"}`}>{words}</p>
    </div>
  );
}
