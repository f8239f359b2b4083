import { Form, Link, NavLink } from "react-router";
import { ThemeSwitch } from "./ThemeSwitch";
import type { ThemeChoice } from "./theme";
import { LinkButton } from "./ui/Button";
import { Icon } from "./ui/Icon";
import { Menu } from "./ui/Menu";
import { Wordmark } from "./Wordmark";

export interface SignedInPerson {
  /** As shown to others. */
  name: string;
  userName: string;
  administrator?: boolean;
  /** How much in the inbox was not read. */
  unread?: number;
}

export interface HeaderProps {
  person: SignedInPerson | null;
  theme: ThemeChoice;
}

export function Header({ person, theme }: HeaderProps) {
  return (
    <header className="shell-header no-print">
      <div className="shell-width shell-bar">
        <Link to="/" className="shell-home" aria-label="Swale, front page">
          <Wordmark />
        </Link>
        <nav aria-label="Main" className="shell-nav">
          <NavLink to="/projects">Projects</NavLink>
          <NavLink to="/search" className="shell-terse">
            <Icon name="search" />
            <span>Search</span>
          </NavLink>
          {person && (
            <NavLink to="/inbox" className="shell-terse">
              <Icon name="note" />
              <span>Inbox</span>
              {Boolean(person.unread) && (
                <span className="shell-count">
                  {Math.min(person.unread ?? 0, 99)}
                  <span className="sr-only"> unread</span>
                </span>
              )}
            </NavLink>
          )}
        </nav>
        <div className="shell-person">
          {person ? <PersonMenu person={person} theme={theme} /> : <VisitorBar theme={theme} />}
        </div>
      </div>
    </header>
  );
}

function VisitorBar({ theme }: { theme: ThemeChoice }) {
  return (
    <>
      <Menu label="Colours" icon="theme" terse align="end">
        <ThemeSwitch choice={theme} />
      </Menu>
      <LinkButton to="/sign-in" size="small">
        Sign in
      </LinkButton>
    </>
  );
}

function PersonMenu({ person, theme }: { person: SignedInPerson; theme: ThemeChoice }) {
  return (
    <Menu label={person.name} icon="person" terse align="end">
      <Link to="/settings">Settings</Link>
      <Link to="/settings/tokens">Tokens for scripts</Link>
      {person.administrator && <Link to="/admin">Administration</Link>}
      <ThemeSwitch choice={theme} />
      <Form method="post" action="/sign-out">
        <button type="submit">Sign out</button>
      </Form>
    </Menu>
  );
}
