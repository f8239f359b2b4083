import { z } from "zod";

export const closeSchema = z.object({
  notes: z.enum(["stay", "go"], { error: "Choose what becomes of your notes." }),
  userName: z.string({ error: "Type your user name to close the account." }).trim().toLowerCase(),
});
