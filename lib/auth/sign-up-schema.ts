import { z } from "zod";

export const signUpInput = z.object({
  shopName: z.string().trim().min(2, "Name the shop.").max(120, "That is more than 120 characters."),
  name: z.string().trim().min(2, "Type your name.").max(120, "That is more than 120 characters."),
  email: z.email("That is not an e-mail address.").max(200),
  password: z.string().min(10, "A password has at least ten characters.").max(128, "That is more than 128 characters."),
  timeZone: z.string().max(60).optional(),
});

export type SignUpInput = z.input<typeof signUpInput>;
