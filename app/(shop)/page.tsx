import { redirect } from "next/navigation";
import { signedInActor } from "@/lib/pages/page-actor";

/** The first page of each role: staff begin with the day, customers with their own instruments. */
export default async function FirstPage() {
  const { role } = await signedInActor();
  redirect(role === "customer" ? "/my" : "/today");
}
