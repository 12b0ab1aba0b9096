import { notFound, redirect } from "next/navigation";
import { AppError } from "@/lib/errors/app-error";

/** Runs a page's read; what is not there or not yours is the not-found page, signed out leads to sign-in. */
export async function pageRead<T>(from: string, work: () => Promise<T>): Promise<T> {
  try {
    return await work();
  } catch (error) {
    if (error instanceof AppError) {
      if (error.code === "not_found" || error.code === "forbidden") notFound();
      if (error.code === "unauthenticated") redirect(`/sign-in?next=${encodeURIComponent(from)}`);
    }
    throw error;
  }
}
