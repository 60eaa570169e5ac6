// The style sheet of the report: survey paper, ink, one blue. System fonts only; nothing is fetched.
import { pageStyle } from './style-page.ts';
import { printStyle } from './style-print.ts';

/** `foot` stands at the foot of every printed page. */
export function styleSheet(foot: string): string {
  return pageStyle + printStyle(foot);
}
