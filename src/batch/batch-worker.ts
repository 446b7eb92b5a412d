// What runs on a worker thread of a batch: answers some tables. Only the built file is ever loaded by a thread.
import { answerChunk, type ChunkDone, type ChunkTask } from './chunk.js';

export default function answerTask(task: ChunkTask): Promise<ChunkDone> {
  return answerChunk(task, { threads: 1 });
}
