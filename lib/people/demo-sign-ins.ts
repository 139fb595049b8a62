/** The invented people of the demo shops, shown on the sign-in page of a local start and nowhere else. */
export const demoPassword = "port-averil-demo-2026";

export const demoSignIns = [
  { email: "owner@larchandwren.example", label: "Owner", shop: "Larch & Wren Piano Service" },
  { email: "office@larchandwren.example", label: "Office", shop: "Larch & Wren Piano Service" },
  { email: "tech@larchandwren.example", label: "Technician", shop: "Larch & Wren Piano Service" },
  { email: "customer@example.org", label: "Customer", shop: "Larch & Wren Piano Service" },
  { email: "owner@harbourstreet.example", label: "Owner", shop: "Harbour Street" },
] as const;
