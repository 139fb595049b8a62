import "server-only";
import { notFound } from "next/navigation";
import { z } from "zod";
import { AppError } from "@/lib/errors";

/** A page's record, or the not-found page: for an id that is none, a missing one, and another shop's alike. */
export async function orNotFound<T>(id: string, read: (id: string) => Promise<T>): Promise<T> {
  if (!z.uuid().safeParse(id).success) notFound();
  try {
    return await read(id);
  } catch (error) {
    if (error instanceof AppError && error.code === "not-found") notFound();
    throw error;
  }
}
