/** The invented people of the demo shops, shown on the sign-in page of a local start and nowhere else. */
export const demoSignIns = {
  password: "port-averil-demo-2026",
  shops: [
    {
      name: "Larch & Wren Piano Service",
      people: [
        { email: "owner@larchandwren.example", label: "Owner" },
        { email: "office@larchandwren.example", label: "Office" },
        { email: "tech@larchandwren.example", label: "Technician" },
        { email: "customer@example.org", label: "Customer" },
      ],
    },
    {
      name: "Harbour Street Pianos",
      people: [{ email: "owner@harbourstreet.example", label: "Owner" }],
    },
  ],
} as const;
