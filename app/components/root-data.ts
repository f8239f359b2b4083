import type { SignedInPerson } from "./Header.tsx";
import type { ThemeChoice } from "./theme.ts";
import type { FlashMessage } from "./ui/Toast.tsx";

/** What every page knows. */
export interface RootData {
  theme: ThemeChoice;
  /** Who is signed in; null for a visitor. */
  person: SignedInPerson | null;
  /** A message kept across a redirect, shown once. */
  flash: FlashMessage | null;
}
