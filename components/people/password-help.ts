import { shortestAlone } from "@/lib/auth/passwords";

export const passwordHelp = `At least ${shortestAlone} characters of any kind. A short sentence works well, and so does a password keeper.`;
