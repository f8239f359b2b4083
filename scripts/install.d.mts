export const ROOT: string;
export const BROWSER: string;
export function findProgram(name: string): string | undefined;
export function installPrograms(wanted: { database: boolean; tests: boolean }): Promise<void>;
