/** What is said where a call fails before the server has given its own reason. */
export const noAnswer = "The server did not answer. Check the connection and try again.";
