export const root: string;
export const HOW_TO_GET_CHROMIUM: string;
/** path of a Chromium-based browser, or null */
export function findChromium(): string | null;
export function ensureChromium(): string | null;
export function ensureInstalled(): void;
/** why the installed packages are not those of the lock file, or null */
export function installationFault(): string | null;
export function run(command: string, args: readonly string[], options?: object): number;
export function runTool(script: string, args: readonly string[], options?: object): number;
export function startTool(script: string, args: readonly string[]): Promise<{ status: number; said: string }>;
