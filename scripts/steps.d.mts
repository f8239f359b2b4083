export function step<T>(title: string, work: () => T | Promise<T>): Promise<T>;
export class PlainFailure extends Error {}
export function reportFailure(error: unknown): void;
export function tellStepsOnStandardError(): void;
