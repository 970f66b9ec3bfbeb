import { signedIn } from "@/app/(me)/_components/signed-in";

export default signedIn("/account");
