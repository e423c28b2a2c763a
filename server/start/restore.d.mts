export function restore(address: string, file: string): void;
