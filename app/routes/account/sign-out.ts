import { createElement } from "react";
import { redirect } from "react-router";
import { endSession } from "~/auth/session.server";
import type { Route } from "./+types/sign-out";
import { SignOutPage } from "./components/SignOutPage.tsx";

export const meta: Route.MetaFunction = () => [{ title: "Sign out · Swale" }];

/** Ends the session. Someone who is not signed in is signed out already: that is no error. */
export async function action({ request }: Route.ActionArgs) {
  return redirect("/", { headers: { "Set-Cookie": await endSession(request) } });
}

export default function SignOut() {
  return createElement(SignOutPage);
}
