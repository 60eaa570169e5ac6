/** The page without its data and its script: what readers see of it. */
export function withoutScripts(html: string): string {
  return html.replace(/<script[ >][^]*?<\/script>/g, '');
}
