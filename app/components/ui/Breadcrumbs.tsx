import { Link } from "react-router";

export interface Crumb {
  label: string;
  to: string;
}

/** The way back up; the page itself is its heading and not repeated here. */
export function Breadcrumbs({ items }: { items: Crumb[] }) {
  return (
    <nav aria-label="The way here" className="crumbs no-print">
      <ol>
        {items.map((item) => (
          <li key={item.to}>
            <Link to={item.to}>{item.label}</Link>
          </li>
        ))}
      </ol>
    </nav>
  );
}
