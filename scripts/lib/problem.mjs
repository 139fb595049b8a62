/** Something the person at the terminal can act on: shown as these words alone, without a stack. */
export class Problem extends Error {
  name = "Problem";
}

/** A command that ended badly; carries what it said last. */
export class CommandFailed extends Error {
  name = "CommandFailed";

  constructor(message, { output = "", logFile } = {}) {
    super(message);
    this.output = output;
    this.logFile = logFile;
  }
}

export function explain(error) {
  if (error instanceof CommandFailed) {
    const said = error.output.trim().split("\n").slice(-60).join("\n");
    const where = error.logFile ? `\nThe whole output is in ${error.logFile}` : "";
    return `${error.message}${said ? `\n\n${said}\n` : ""}${where}`;
  }
  if (error instanceof Problem) return error.message;
  return error instanceof Error ? (error.stack ?? error.message) : String(error);
}
