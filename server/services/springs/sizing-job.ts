import type { SizeResponse } from '#shared/schemas/spring'
import { searchDesign, type DesignQuestion, type FoundDesign } from './search-design'
import { answerSizeRequest, type SizeQuestion } from './size-request'

/** What a sizing thread is asked, and what it answers each with. */
type Tasks = { 'find-design': { question: DesignQuestion, answer: FoundDesign }, 'size': { question: SizeQuestion, answer: SizeResponse } }

export type SizingTask = keyof Tasks
export type SizingJob = { [T in SizingTask]: { task: T, question: Tasks[T]['question'] } }[SizingTask]
export type SizingAnswer = Tasks[SizingTask]['answer']
export type SizingAnswerTo<T extends SizingTask> = Tasks[T]['answer']

/** Does a job; plain computing, on whichever thread it is called. */
export function doSizingJob(job: SizingJob): SizingAnswer {
  return job.task === 'find-design' ? searchDesign(job.question) : answerSizeRequest(job.question)
}
