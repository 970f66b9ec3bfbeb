/** The request header in which `proxy.ts` hands on the address that was asked for; a sender's own is overwritten. */
export const ASKED_FOR = "x-cembalo-asked-for";
