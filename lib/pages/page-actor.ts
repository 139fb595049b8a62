import "server-only";
import type { Route } from "next";
import { headers } from "next/headers";
import { redirect } from "next/navigation";
import { type Actor, currentPerson } from "@/lib/auth/actor";

/** For pages of the book: who is asking, among the staff. Everybody else is sent where they belong. */
export async function staffActor(): Promise<Actor> {
  const actor = await signedInActor();
  if (actor.role === "customer") redirect("/my");
  return actor;
}

/** For a customer's own pages. Staff see the same records in the book. */
export async function customerActor(): Promise<Actor & { customerId: string }> {
  const actor = await signedInActor();
  const { customerId } = actor;
  if (actor.role !== "customer" || !customerId) redirect("/today");
  return { ...actor, customerId };
}

export async function signedInActor(): Promise<Actor> {
  const person = await currentPerson();
  if (!person) {
    const path = (await headers()).get("x-pathname") ?? "/";
    redirect((path === "/" ? "/sign-in" : `/sign-in?next=${encodeURIComponent(path)}`) as Route);
  }
  if (!person.actor) redirect("/open-shop");
  return person.actor;
}
