export function backUp(address: string, file: string): void;
