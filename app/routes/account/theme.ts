import { data, redirect } from "react-router";
import { safePath } from "~/auth/next";
import { isThemeChoice, themeCookie } from "~/components/theme";
import type { Route } from "./+types/theme";

/** Keeps the chosen colours in a cookie; anybody may. */
export async function action({ request }: Route.ActionArgs) {
  const form = await request.formData();
  const theme = form.get("theme");
  if (!isThemeChoice(theme)) throw data("There are three choices of colours: system, light and dark.", 400);
  const headers = { "Set-Cookie": themeCookie(theme) };
  // Asked for by script, the page stays where it is.
  if (isDataRequest(request)) return data({ theme }, { headers });
  return redirect(safePath(form.get("returnTo"), "/"), { headers });
}

export function loader() {
  return redirect("/");
}

function isDataRequest(request: Request): boolean {
  return new URL(request.url).pathname.endsWith(".data");
}
