/** What a worker thread of a study runs. */
export { workMember, workRun } from '../src/io/study/memberWork.ts'
