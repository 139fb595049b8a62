/** Invented people, places and makers of the demo shop. Nobody of these names is meant. */

export const makers = ["Castellan", "Brightwater", "Halden & Pike", "Osterby"] as const;

export const models: Record<
  (typeof makers)[number],
  { grand: readonly string[]; upright: readonly string[] }
> = {
  Castellan: { grand: ["158", "186", "214"], upright: ["U 118", "U 124"] },
  Brightwater: { grand: ["Cove 170", "Cove 200"], upright: ["Quay 112", "Quay 121"] },
  "Halden & Pike": { grand: ["160", "190"], upright: ["121", "132"] },
  Osterby: { grand: ["180", "212", "274"], upright: ["115", "127"] },
};

export const streets = [
  "Anchor Row",
  "Beacon Street",
  "Chandler's Lane",
  "Drift Hill",
  "Ebb Street",
  "Fathom Road",
  "Gullwing Terrace",
  "Heron Close",
  "Inlet Road",
  "Jetty Lane",
  "Kelp Street",
  "Lantern Hill",
  "Mooring Place",
  "Net Loft Yard",
  "Oar Lane",
  "Pilot Street",
] as const;

export const towns = [
  { city: "Port Averil", postalCode: "70110", latitude: 52.312, longitude: -6.471 },
  { city: "Saltmere", postalCode: "70124", latitude: 52.355, longitude: -6.538 },
  { city: "Upper Fenwick", postalCode: "70138", latitude: 52.271, longitude: -6.352 },
  { city: "Gannet Head", postalCode: "70151", latitude: 52.398, longitude: -6.619 },
] as const;

const given = [
  "Ada",
  "Bram",
  "Celia",
  "Dorian",
  "Elin",
  "Farid",
  "Greta",
  "Hugo",
  "Iris",
  "Jonah",
  "Katya",
  "Lennart",
  "Mirela",
  "Nils",
  "Odile",
  "Pavel",
  "Quentin",
  "Rosalind",
  "Silvan",
  "Tamsin",
] as const;

const family = [
  "Ashgrove",
  "Brannock",
  "Calloway",
  "Drummle",
  "Eastlake",
  "Fennimore",
  "Garrick-Holm",
  "Hallamby",
  "Ivensen",
  "Jessamy",
  "Kittering",
  "Lorrimer",
  "Marchbank",
  "Northgate",
  "Okonski",
  "Penhallow",
  "Quillan",
  "Rudbeck",
  "Sandmark",
  "Thistlewood",
] as const;

/** Every index gives another name, up to 400. */
export function personName(index: number): string {
  return `${given[(index * 7) % given.length]} ${family[(index + Math.floor(index / family.length)) % family.length]}`;
}

export const standingNotes = [
  "Keep it round above C6; two singers rehearse here.",
  "Please leave the lid as you find it, the cat sleeps there.",
  "The left pedal should stay light.",
  "She plays Satie at night: nothing bright.",
  "Bench screws work loose, have a look.",
] as const;

export const accessNotes = [
  "Ring twice; the dog is friendly.",
  "Key with the neighbour at number 4.",
  "Park in the yard, the street is residents only.",
  "Second floor, no lift.",
  "The gate sticks: lift and push.",
] as const;
