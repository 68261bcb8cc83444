/** Changes whenever the same line and options may give other figures. */
export const engineVersion = "forebay 1";
