import type { ReactNode } from "react";
import { DRAWINGS, type DrawingName } from "./drawings";

export interface EmptyStateProps {
  drawing: DrawingName;
  title: string;
  /** The next thing to do: a LinkButton or a form. */
  action?: ReactNode;
  /** One sentence at most. */
  children?: ReactNode;
}

/** Where a list would stand: a tiny drawing and the next action. */
export function EmptyState({ drawing, title, action, children }: EmptyStateProps) {
  const Drawing = DRAWINGS[drawing];
  return (
    <div className="empty">
      <Drawing />
      <div>
        <p className="empty-title">{title}</p>
        {children && <p className="soft">{children}</p>}
        {action && <div className="empty-action">{action}</div>}
      </div>
    </div>
  );
}
