/** Customers and their addresses are two lists of one chapter. */
export const listTabs = [
  { href: "/customers", label: "Customers" },
  { href: "/sites", label: "Sites" },
];
