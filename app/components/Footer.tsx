/** The foot of every page: the cautions that always hold. */
export function Footer() {
  return (
    <footer className="shell-footer">
      <div className="shell-width">
        <p className="cautions">
          Transmit only where your licence and local rules allow: a dip outside your bands is a finding, not a
          permission. Never transmit into an analyser, a bridge or anyone near an antenna: exposure limits are
          set by local regulators. Keep masts and wires away from power lines and take them down before
          lightning; work at height and mains work belong to those qualified for it. Numbers are as good as
          the bench they were taken with; the product says how good that is.
        </p>
        <p className="mt-2">
          <a href="/methods">Methods: how each number is reckoned</a> <span aria-hidden="true">·</span>{" "}
          <a href="/api">For scripts: the API</a>
        </p>
      </div>
    </footer>
  );
}
