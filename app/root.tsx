import type { ReactNode } from "react";
import { data, Links, Meta, Outlet, Scripts, ScrollRestoration, useRouteLoaderData } from "react-router";
import type { Route } from "./+types/root";
import "./app.css";
import { refuseForeignOrigin } from "~/auth/origin.server";
import { findPerson } from "~/auth/require.server";
import { ErrorPage } from "~/components/ErrorPage";
import { Footer } from "~/components/Footer";
import { Header } from "~/components/Header";
import type { RootData } from "~/components/root-data";
import { themeFromCookie } from "~/components/theme";
import { ToastProvider } from "~/components/ui/Toast";
import { countUnread } from "~/db/notices.server";
import { takeMessage } from "~/services/flash.server";

export const middleware: Route.MiddlewareFunction[] = [refuseForeignOrigin];

export const links: Route.LinksFunction = () => [
  { rel: "icon", href: "/favicon.svg", type: "image/svg+xml" },
];

export const meta: Route.MetaFunction = () => [
  { title: "Swale" },
  {
    name: "description",
    content: "A shared workspace where antenna experimenters turn sweeps into findings.",
  },
];

export async function loader(args: Route.LoaderArgs) {
  const { request } = args;
  const [person, { message, forget }] = await Promise.all([findPerson(args), takeMessage(request)]);
  const unread = person ? await countUnread(person.id) : 0;
  const root: RootData = {
    theme: themeFromCookie(request.headers.get("cookie")),
    person: person && {
      name: person.name,
      userName: person.userName,
      administrator: person.administrator,
      unread,
    },
    flash: message ? { id: crypto.randomUUID(), text: message } : null,
  };
  return data(root, forget ? { headers: { "Set-Cookie": forget } } : undefined);
}

export function Layout({ children }: { children: ReactNode }) {
  const root = useRouteLoaderData<typeof loader>("root");
  return (
    <html lang="en" data-theme={root?.theme ?? "system"}>
      <head>
        <meta charSet="utf-8" />
        <meta name="viewport" content="width=device-width, initial-scale=1" />
        <Meta />
        <Links />
      </head>
      <body className="shell">
        <a href="#main" className="skip-link">
          Skip to the content
        </a>
        <ToastProvider flash={root?.flash ?? null}>
          <Header person={root?.person ?? null} theme={root?.theme ?? "system"} />
          <main id="main" tabIndex={-1} className="shell-main">
            {children}
          </main>
          <Footer />
        </ToastProvider>
        <ScrollRestoration />
        <Scripts />
      </body>
    </html>
  );
}

export default function App() {
  return <Outlet />;
}

export function ErrorBoundary({ error }: Route.ErrorBoundaryProps) {
  return <ErrorPage error={error} />;
}
