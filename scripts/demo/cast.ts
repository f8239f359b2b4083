/** Who plays in the stories. */
export const CAST = ["ada-marsh", "bram-sedge", "cleo-reed", "dov-heron"] as const;
export type Who = (typeof CAST)[number];

/** User id and user name of everybody in the story. */
export type Cast = Record<Who, { id: number; userName: string }>;
