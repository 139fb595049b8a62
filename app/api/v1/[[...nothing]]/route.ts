import { defineRoute } from "@/lib/doors/define-route";
import { AppError } from "@/lib/errors";

/** What no other route answers: a program gets a problem it can read, not a page. */
const handle = async (): Promise<never> => {
  throw new AppError(
    "not-found",
    "There is nothing at this address. /api/v1/openapi.json says what there is.",
  );
};

export const GET = defineRoute({
  method: "GET",
  permission: "anyone",
  summary: "Nothing",
  described: false,
  handle,
});

export const POST = defineRoute({
  method: "POST",
  permission: "anyone",
  summary: "Nothing",
  described: false,
  handle,
});

export const PUT = defineRoute({
  method: "PUT",
  permission: "anyone",
  summary: "Nothing",
  described: false,
  handle,
});

export const PATCH = defineRoute({
  method: "PATCH",
  permission: "anyone",
  summary: "Nothing",
  described: false,
  handle,
});

export const DELETE = defineRoute({
  method: "DELETE",
  permission: "anyone",
  summary: "Nothing",
  described: false,
  handle,
});
