import { customAlphabet } from "nanoid";

/** Ten letters and digits that are not mistaken for one another; lower case, as collations fold case. */
export const newPublicId = customAlphabet("23456789abcdefghjkmnpqrstuvwxyz", 10);
