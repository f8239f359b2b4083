import type { ReactNode } from "react";
import { Links, Meta, Outlet, Scripts, ScrollRestoration, useRouteLoaderData } from "react-router";
import type { Route } from "./+types/root";
import "./app.css";
import { ErrorPage } from "~/components/ErrorPage";
import { Footer } from "~/components/Footer";
import { Header, type SignedInPerson } from "~/components/Header";
import { type ThemeChoice, themeFromCookie } from "~/components/theme";
import { type FlashMessage, ToastProvider } from "~/components/ui/Toast";

export interface RootData {
  theme: ThemeChoice;
  /** Who is signed in; null for a visitor. */
  person: SignedInPerson | null;
  /** A message kept across a redirect, shown once. */
  flash: FlashMessage | null;
}

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

export async function loader({ request }: Route.LoaderArgs): Promise<RootData> {
  return { theme: themeFromCookie(request.headers.get("cookie")), person: null, flash: null };
}

export function Layout({ children }: { children: ReactNode }) {
  const data = useRouteLoaderData<typeof loader>("root");
  return (
    <html lang="en" data-theme={data?.theme ?? "system"}>
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
        <ToastProvider flash={data?.flash ?? null}>
          <Header person={data?.person ?? null} theme={data?.theme ?? "system"} />
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
