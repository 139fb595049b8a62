import { AppError } from "@/lib/errors";

/** The error a call is expected to be refused with; any other one is thrown on. */
export async function refusal(run: Promise<unknown>): Promise<AppError> {
  try {
    await run;
  } catch (error) {
    if (error instanceof AppError) return error;
    throw error;
  }
  throw new Error("It was not refused");
}
