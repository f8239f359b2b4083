export function layerFaults(root: string): string[];
