export const ICON_SIZES: readonly number[];
export function renderIcon(svg: string, size: number): Buffer;
