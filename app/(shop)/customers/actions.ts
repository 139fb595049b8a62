"use server";

import { revalidatePath } from "next/cache";
import { z } from "zod";
import { customerChange, newCustomer } from "@/lib/customers/schema";
import { changeCustomer, createCustomer } from "@/lib/customers/service";
import { defineAction } from "@/lib/doors/define-action";

export const createCustomerAction = defineAction({
  name: "customers.create",
  permission: "customers.change",
  input: newCustomer,
  run: async (actor, input) => {
    const record = await createCustomer(actor, input);
    revalidatePath("/customers", "layout");
    return record;
  },
});

export const changeCustomerAction = defineAction({
  name: "customers.change",
  permission: "customers.change",
  input: customerChange.extend({ id: z.uuid() }),
  run: async (actor, { id, ...change }) => {
    const record = await changeCustomer(actor, id, change);
    revalidatePath("/customers", "layout");
    return record;
  },
});
