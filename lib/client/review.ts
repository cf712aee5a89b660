import { useWrite } from "./act";
import { reviewKeys } from "./query-keys";

export const useSignRound = (roundId: string) =>
  useWrite("POST", `/api/v1/review/rounds/${roundId}/sign`, reviewKeys.all);
export const useSendBack = (roundId: string) =>
  useWrite("POST", `/api/v1/review/rounds/${roundId}/send-back`, reviewKeys.all);
