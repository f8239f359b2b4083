/** Why a form of the trail page was not done. */
export function Problems({ errors }: { errors: string[] }) {
  if (errors.length === 0) return null;
  return (
    <p role="alert" className="text-alarm text-small">
      {errors.join(" ")}
    </p>
  );
}
