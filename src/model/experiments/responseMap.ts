/**
 * Where and when a cloud remembers a change: its brightness answers a small pulse in each altitude band at each onset.
 */
export { planResponseMap } from './planResponseMap.ts'
export type {
  Look,
  ResponseMapCell,
  ResponseMapMember,
  ResponseMapOptions,
  ResponseMapPlan,
} from './responseMapPlan.ts'
export { type ResponseMapRow, responseMapTable } from './responseMapTable.ts'
