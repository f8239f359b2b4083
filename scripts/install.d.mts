export const ROOT: string;
export function findProgram(name: string): string | undefined;
