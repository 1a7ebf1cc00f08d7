export interface Served {
  readonly origin: string;
  close(): Promise<void>;
}
export interface ServeOptions {
  readonly folder: string;
  readonly port?: number;
  /** fail when the port is in use, instead of taking the next free one */
  readonly fixed?: boolean;
  /** where "/" leads */
  readonly front?: string;
  readonly tls?: { readonly key: Buffer; readonly cert: Buffer };
}
export function serve(options: ServeOptions): Promise<Served>;
export function fileOf(folder: string, address: string | undefined): string | null;
