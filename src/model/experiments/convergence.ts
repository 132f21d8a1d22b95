/** What the fineness of the integration does to the results of a run. */

export { type ConvergenceRow, convergenceTable } from './convergenceTable.ts'
export {
  type ConvergenceMember,
  type ConvergencePlan,
  planConvergence,
  type Refinement,
} from './planConvergence.ts'
