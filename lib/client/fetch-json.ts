/** RFC 9457, with the field errors and the current record our doors add. */
export type Problem = {
  type: string;
  title: string;
  status: number;
  detail?: string;
  code?: string;
  errors?: Array<{ path: string; message: string }>;
  current?: unknown;
};

export class ProblemError extends Error {
  override readonly name = "ProblemError";

  constructor(readonly problem: Problem) {
    super(problem.detail ?? problem.title);
  }

  get status(): number {
    return this.problem.status;
  }
}

/** The request never got an answer: no network, or the server is away. Nothing is known to be wrong with it. */
export class NetworkError extends Error {
  override readonly name = "NetworkError";

  constructor(cause: unknown) {
    super("The server did not answer. Check the connection and try again.", { cause });
  }
}

export type FetchJsonOptions = {
  method?: "GET" | "POST" | "PUT" | "PATCH" | "DELETE";
  body?: unknown;
  query?: Record<string, string | number | boolean | null | undefined> | URLSearchParams;
  headers?: Record<string, string>;
  signal?: AbortSignal;
};

/** Calls our own API and gives the parsed answer, or throws ProblemError or NetworkError. */
export async function fetchJson<T>(path: string, options: FetchJsonOptions = {}): Promise<T> {
  const { body, headers, signal } = options;
  const method = options.method ?? (body === undefined ? "GET" : "POST");

  let response: Response;
  try {
    response = await fetch(withQuery(path, options.query), {
      method,
      credentials: "same-origin",
      headers: {
        accept: "application/json, application/problem+json",
        ...(body === undefined ? {} : { "content-type": "application/json" }),
        ...headers,
      },
      body: body === undefined ? undefined : JSON.stringify(body),
      signal,
    });
  } catch (error) {
    // An abort is the caller's own wish (a newer search, a closed page), not a failure to report.
    if (signal?.aborted) throw error;
    throw new NetworkError(error);
  }

  const answer = await readJson(response);
  if (!response.ok) throw new ProblemError(toProblem(answer, response));
  if (answer === undefined && response.status !== 204 && response.status !== 205) {
    throw new ProblemError({
      type: "about:blank",
      title: "The answer could not be read.",
      status: response.status,
    });
  }
  return answer as T;
}

function withQuery(path: string, query: FetchJsonOptions["query"]): string {
  if (!query) return path;
  const params = query instanceof URLSearchParams ? query : new URLSearchParams();
  if (!(query instanceof URLSearchParams)) {
    for (const [name, value] of Object.entries(query)) {
      if (value !== undefined && value !== null && value !== "") params.set(name, String(value));
    }
  }
  const text = params.toString();
  return text ? `${path}${path.includes("?") ? "&" : "?"}${text}` : path;
}

async function readJson(response: Response): Promise<unknown> {
  const text = await response.text();
  if (!text) return undefined;
  try {
    return JSON.parse(text);
  } catch {
    return undefined;
  }
}

function toProblem(answer: unknown, response: Response): Problem {
  const given = typeof answer === "object" && answer !== null ? (answer as Partial<Problem>) : {};
  return {
    ...given,
    type: typeof given.type === "string" ? given.type : "about:blank",
    title:
      typeof given.title === "string"
        ? given.title
        : `The server answered with an error (${response.status}).`,
    status: response.status,
    errors: Array.isArray(given.errors) ? given.errors : undefined,
  };
}
