/** Stands in for the package that refuses to load outside the server's bundle. */
export {};
