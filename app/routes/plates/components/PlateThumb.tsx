/** The frozen figure itself, small; the one of the theme that is not shown is not loaded. */
export function PlateThumb({ publicId, title }: { publicId: string; title: string }) {
  return (
    <span className="plate-thumb">
      {(["light", "dark"] as const).map((theme) => (
        <img
          key={theme}
          className={`for-${theme}`}
          src={`/plates/${publicId}.png?width=640&theme=${theme}`}
          alt={`Figure of ${title}`}
          width={640}
          height={400}
          loading="lazy"
          decoding="async"
        />
      ))}
    </span>
  );
}
