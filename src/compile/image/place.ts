// Where the record of a phase is built: what it reads, and the list that takes its sections.
import type { Movement } from '../../landscape/landscape.ts';
import type * as M from '../../model/model.ts';
import type { SectionList } from './section.ts';

export interface PhasePlace {
  readonly list: SectionList;
  readonly model: M.Model;
  readonly index: number;
  readonly key: number;
  readonly movement: Movement | null;
  /** Ways of the dispersals before this phase. */
  readonly waysBefore: number;
}
