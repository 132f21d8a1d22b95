/** Comparison of a control and a changed run: made comparable, compared, summed up. */
export { alignedPair } from './alignedPair.ts'
export { compareHeadlines, type HeadlinePair, type ResponseRow } from './compareHeadlines.ts'
export { onsetOf, type ResponseSummary, summariseResponse } from './summariseResponse.ts'
export { tightened } from './tightened.ts'
