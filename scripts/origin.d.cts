export const LOCAL_ORIGIN: string;
export function readOrigin(text: string | undefined): string;
