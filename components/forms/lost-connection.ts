/** Said when a press got no answer; in a file of its own, so that a page that only says it does not load the forms. */
export const LOST_CONNECTION = "Nothing was lost: check the connection and press again.";
