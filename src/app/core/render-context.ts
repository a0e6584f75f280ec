/** What the Express server tells the renderer about a request; read through `REQUEST_CONTEXT`. */
export interface RenderContext {
  /** where the server listens and the API is called, `http://127.0.0.1:3000` */
  readonly origin: string;
  /** the address that visitors use, for links that leave the site (`og:image`) */
  readonly publicUrl?: string;
}
