import { redirect } from "next/navigation";
import { firstPage } from "@/app/_frame/first-page";
import { pageActor } from "@/lib/auth/get-actor";

export default async function DonePage() {
  redirect(firstPage(await pageActor("/me")));
}
