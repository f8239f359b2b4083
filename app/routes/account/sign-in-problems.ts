/** Why a sign-in did not happen, in the words of the page. */
export const SIGN_IN_PROBLEMS = {
  denied: {
    status: 403,
    title: "Signing in was called off",
    text: "You, or the provider, said no on its page. Nothing was stored here. Sign in again when you like.",
  },
  state: {
    status: 400,
    title: "That sign-in did not begin here",
    text: "The way back from the provider did not match a sign-in of this browser, or it was used before. Nothing was changed. Begin again with the button below.",
  },
  code: {
    status: 400,
    title: "The provider did not accept that sign-in",
    text: "Its one-time code was used before or is too old. Nothing was changed. Begin again with the button below.",
  },
  provider: {
    status: 502,
    title: "The provider could not be asked",
    text: "It did not answer, or not in a way we understand. Nothing was changed. Wait a minute and try again.",
  },
  "email-over": {
    status: 410,
    title: "That code does not work any more",
    text: "It was used, or is older than ten minutes, or was typed wrongly five times. Nothing was changed. Ask for another one below.",
  },
  suspended: {
    status: 403,
    title: "This account is suspended",
    text: "An administrator of this site has closed it for now. What you stored is kept. Ask whoever runs the site.",
  },
} as const;

export type SignInProblemId = keyof typeof SIGN_IN_PROBLEMS;

export function isSignInProblem(value: unknown): value is SignInProblemId {
  return typeof value === "string" && Object.hasOwn(SIGN_IN_PROBLEMS, value);
}
