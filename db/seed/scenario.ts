import { accessNotes, makers, models, personName, standingNotes, streets, towns } from "./names";
import { chance as chanceFrom } from "./random";

/** Who and what there is in the demo: customers with their sites and instruments. Plain data, no database. */

export type SeedInstrument = {
  key: string;
  maker: string;
  model: string;
  serial: string;
  year: number;
  kind: "grand" | "upright";
  size: "small" | "medium" | "large";
  room: string;
  breakMidi: number;
  firstMidi: number;
  lastMidi: number;
  standingNote: string | null;
  /** What happened to it, where the demo tells a story. */
  story: null | "wrong-wire" | "flooded" | "sixty-flat";
  /** Sheets with many notes rather than a few for the pitch. */
  detailed: boolean;
};

export type SeedCustomer = {
  key: string;
  kind: "person" | "organisation";
  name: string;
  contactName: string | null;
  email: string | null;
  phone: string;
  site: {
    name: string;
    street: string;
    postalCode: string;
    city: string;
    latitude: number;
    longitude: number;
    accessNotes: string | null;
  };
  instruments: SeedInstrument[];
};

const random = () => chanceFrom(20_231_114);

function place(index: number, jitter: number) {
  const town = towns[index % 7 < 4 ? 0 : (index % 3) + 1] ?? towns[0];
  return {
    street: `${2 + ((index * 13) % 60)} ${streets[(index * 5) % streets.length]}`,
    postalCode: town.postalCode,
    city: town.city,
    latitude: Math.round((town.latitude + 0.02 * jitter) * 1e5) / 1e5,
    longitude: Math.round((town.longitude + 0.03 * jitter) * 1e5) / 1e5,
  };
}

type Venue = {
  key: string;
  name: string;
  contactName: string;
  site: string;
  street: string;
  accessNotes: string;
  email: string;
};

const venues: Venue[] = [
  {
    key: "conservatory",
    name: "Averil Conservatory",
    contactName: "Mirela Auvray",
    site: "Averil Conservatory",
    street: "1 Lantern Hill",
    accessNotes: "The caretaker opens from eight. Lid keys hang at the desk.",
    email: "venue@example.org",
  },
  {
    key: "hall",
    name: "Harbour Hall Trust",
    contactName: "Jonah Lorrimer",
    site: "Harbour Hall",
    street: "12 Anchor Row",
    accessNotes: "Stage door. The stage is free until five.",
    email: "hall@example.org",
  },
  {
    key: "chapel",
    name: "Chapel of the Tide",
    contactName: "Odile Ivensen",
    site: "Chapel of the Tide",
    street: "3 Ebb Street",
    accessNotes: "The heating is off on weekdays: bring a hygrometer.",
    email: "chapel@example.org",
  },
  {
    key: "church",
    name: "St Brannoc's Church",
    contactName: "Hugo Penhallow",
    site: "St Brannoc's Church",
    street: "27 Beacon Street",
    accessNotes: "Key at the parish office, weekdays until noon.",
    email: "church@example.org",
  },
];

export function demoCustomers(): SeedCustomer[] {
  const chance = random();
  let serials = 40_000;

  const piano = (key: string, given: Partial<SeedInstrument> = {}): SeedInstrument => {
    const maker = given.maker ?? chance.pick(makers);
    const kind = given.kind ?? (chance.uniform() < 0.35 ? "grand" : "upright");
    serials += chance.whole(120, 2400);
    const known = models[maker as (typeof makers)[number]];
    return {
      key,
      maker,
      kind,
      model: chance.pick(known[kind]),
      serial: String(serials),
      year: chance.whole(1924, 2019),
      size: kind === "upright" ? "small" : "medium",
      room: "",
      breakMidi: chance.whole(41, 47),
      firstMidi: 21,
      lastMidi: 108,
      standingNote: chance.uniform() < 0.2 ? chance.pick(standingNotes) : null,
      story: null,
      detailed: false,
      ...given,
    };
  };

  const instrumentsOf: Record<string, SeedInstrument[]> = {
    conservatory: [
      piano("castellan-186", {
        maker: "Castellan",
        model: "186",
        serial: "48213",
        year: 1931,
        kind: "grand",
        room: "Room 12",
        breakMidi: 41,
        standingNote: "Keep it round above C6; two singers rehearse here.",
        story: "wrong-wire",
        detailed: true,
      }),
      ...Array.from({ length: 23 }, (_, index) =>
        piano(`conservatory-${index + 1}`, {
          room: `Room ${index < 11 ? index + 1 : index + 2}`,
          detailed: index < 4,
          ...(index % 3 === 0 ? { kind: "grand" as const } : {}),
        }),
      ),
    ],
    hall: [
      piano("osterby-274", {
        maker: "Osterby",
        model: "274",
        serial: "60317",
        year: 2008,
        kind: "grand",
        size: "large",
        room: "Stage",
        detailed: true,
      }),
      piano("hall-upright", { kind: "upright", room: "Green room" }),
    ],
    chapel: [
      piano("halden-121", {
        maker: "Halden & Pike",
        model: "121",
        kind: "upright",
        room: "Choir",
        story: "sixty-flat",
        detailed: true,
      }),
    ],
    church: [
      piano("church-grand", { kind: "grand", room: "Chancel", detailed: true }),
      piano("church-upright", { kind: "upright", room: "Parish room" }),
    ],
  };

  const organisations = venues.map((venue, index): SeedCustomer => {
    const { city, postalCode, latitude, longitude } = place(0, chance.normal());
    return {
      key: venue.key,
      kind: "organisation",
      name: venue.name,
      contactName: venue.contactName,
      email: venue.email,
      phone: `+353 20 910 00${10 + index}`,
      site: {
        name: venue.site,
        street: venue.street,
        city,
        postalCode,
        latitude,
        longitude,
        accessNotes: venue.accessNotes,
      },
      instruments: instrumentsOf[venue.key] ?? [],
    };
  });

  const homes = Array.from({ length: 56 }, (_, index): SeedCustomer => {
    const name = personName(index);
    const flooded = index === 7;
    const count = index < 5 ? 2 : 1;
    return {
      key: `home-${index + 1}`,
      kind: "person",
      name,
      contactName: null,
      email: index === 0 ? "customer@example.org" : index % 6 === 5 ? null : `${slug(name)}@example.org`,
      phone: `+353 20 910 0${100 + index}`,
      site: {
        name: `Home of ${name}`,
        ...place(index, chance.normal()),
        accessNotes: chance.uniform() < 0.4 ? chance.pick(accessNotes) : null,
      },
      instruments: Array.from({ length: count }, (_unused, place) =>
        piano(`home-${index + 1}-${place + 1}`, {
          ...(flooded ? { story: "flooded" as const, detailed: true, kind: "upright" as const } : {}),
          ...(index < 3 && place === 0 ? { detailed: true } : {}),
          ...(index === 20 ? { firstMidi: 21, lastMidi: 105 } : {}),
        }),
      ),
    };
  });

  return [...organisations, ...homes];
}

function slug(name: string): string {
  return name.toLowerCase().replace(/[^a-z]+/g, ".");
}
