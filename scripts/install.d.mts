export const ROOT: string;
export function findProgram(name: string): string | undefined;
export function installPrograms(wanted: { database: boolean; browser: boolean }): Promise<void>;
