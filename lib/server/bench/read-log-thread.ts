import { readBenchLog, type LogOrder } from "@/lib/domain/bench/read-log";
import { answerFromThread } from "../threads/answer-from-thread";
import { filePieces } from "../threads/file-pieces";

export interface LogThreadOrder {
  file: string;
  order: LogOrder;
}

answerFromThread((given, onProgress) => {
  const { file, order } = given as LogThreadOrder;
  return readBenchLog(filePieces(file)(), order, onProgress);
});
