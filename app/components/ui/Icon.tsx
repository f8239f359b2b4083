/** Our own few line drawings, on a 20 × 20 grid. Decoration only: the words beside them say it. */
const PATHS = {
  add: "M10 4v12M4 10h12",
  back: "M12.5 4.5 7 10l5.5 5.5",
  check: "M4 10.5 8 14.5 16 5.5",
  close: "M5 5l10 10M15 5 5 15",
  dip: "M2 5h3c4 0 3 10 5 10s1-10 5-10h3",
  down: "M4.5 7.5 10 13l5.5-5.5",
  download: "M10 3v9.5M5.5 8.5 10 13l4.5-4.5M4 16.5h12",
  edit: "M4 16l1-4 8.5-8.5 3 3L8 15zM11.5 5.5l3 3",
  file: "M5 3h6.5L15 6.5V17H5zM11.5 3v3.5H15",
  forward: "M7.5 4.5 13 10l-5.5 5.5",
  link: "M8.5 11.5l3-3M7 9l-2 2a3 3 0 0 0 4.2 4.2l2-2M13 11l2-2a3 3 0 0 0-4.2-4.2l-2 2",
  note: "M4 4h12v9H9.5L6 16.5V13H4z",
  person: "M10 10a3.2 3.2 0 1 0 0-6.4 3.2 3.2 0 0 0 0 6.4zM3.8 17c.6-3.4 3-5 6.2-5s5.6 1.6 6.2 5",
  plate: "M3 4h14v12H3zM6 8.5h1.5c1.5 0 1.5 4 2.5 4s1-4 2.5-4H14",
  remove: "M4 6h12M8 6V4h4v2M5.5 6l.8 11h7.4l.8-11",
  search: "M9 14.5a5.5 5.5 0 1 0 0-11 5.5 5.5 0 0 0 0 11zM13 13l4 4",
  theme: "M10 3a7 7 0 1 0 0 14zM10 3a7 7 0 0 1 0 14z",
  upload: "M10 13V3.5M5.5 8 10 3.5 14.5 8M4 16.5h12",
  warning: "M10 3.5 17.5 16.5h-15zM10 8.5v3.5M10 14.2v.3",
  whole: "M2.5 10h15M2.5 10l3-3M2.5 10l3 3M17.5 10l-3-3M17.5 10l-3 3",
  zoomIn: "M9 14.5a5.5 5.5 0 1 0 0-11 5.5 5.5 0 0 0 0 11zM13 13l4 4M6.5 9h5M9 6.5v5",
  zoomOut: "M9 14.5a5.5 5.5 0 1 0 0-11 5.5 5.5 0 0 0 0 11zM13 13l4 4M6.5 9h5",
} as const;

export type IconName = keyof typeof PATHS;

export function Icon({ name, size = 20 }: { name: IconName; size?: number }) {
  return (
    <svg
      className="icon"
      width={size}
      height={size}
      viewBox="0 0 20 20"
      fill="none"
      stroke="currentColor"
      strokeWidth="1.5"
      strokeLinecap="round"
      strokeLinejoin="round"
      aria-hidden="true"
    >
      <path d={PATHS[name]} />
    </svg>
  );
}
