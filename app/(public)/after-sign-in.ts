/** Where signing in leads unless a page asked for it: from there everyone goes to their own first page. */
export const AFTER_SIGN_IN = "/sign-in/done";
