import { readBenchRecording, type RecordingOrder } from "@/lib/domain/bench/read-recording";
import { answerFromThread } from "../threads/answer-from-thread";
import { filePieces } from "../threads/file-pieces";

export interface RecordingThreadOrder {
  file: string;
  order: RecordingOrder;
}

answerFromThread((given, onProgress) => {
  const { file, order } = given as RecordingThreadOrder;
  return readBenchRecording(filePieces(file), order, onProgress);
});
