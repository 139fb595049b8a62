"use client";

import { useEffect } from "react";
import type { UseFormRegisterReturn } from "react-hook-form";
import { Select } from "@/components/forms/select";
import { TextInput } from "@/components/forms/text-input";
import type { ShopChoices } from "@/lib/shop/choices";

type Registered = UseFormRegisterReturn & { error: string | undefined };

/** What a shop needs to begin with; the device's time zone is taken unless another is chosen. */
export function ShopBeginningFields({
  choices,
  shopName,
  country,
  timeZone,
  takeTimeZone,
}: {
  choices: ShopChoices;
  shopName: Registered;
  country: Registered;
  timeZone: Registered;
  takeTimeZone: (timeZone: string) => void;
}) {
  // Once, when the page is there: the server cannot know the device's zone.
  useEffect(() => {
    const here = Intl.DateTimeFormat().resolvedOptions().timeZone;
    if (choices.timeZones.some(({ value }) => value === here)) takeTimeZone(here);
  }, []);

  return (
    <>
      <TextInput label="Shop’s name" autoComplete="organization" {...shopName} />
      <Select label="Country" options={choices.countries} autoComplete="country" {...country} />
      <Select
        label="Time zone"
        options={choices.timeZones}
        help="All of this can be changed later, in the shop’s settings."
        {...timeZone}
      />
    </>
  );
}
