import type { Route } from "next";
import Link from "next/link";
import type { ComponentProps } from "react";

export type AppLinkProps = Omit<ComponentProps<typeof Link>, "href"> & { href: string };

/**
 * next/link for components that are handed their address as data. Pages that write an address
 * out themselves use next/link, whose typed routes check it.
 */
export function AppLink({ href, ...rest }: AppLinkProps) {
  return <Link href={href as Route} {...rest} />;
}
