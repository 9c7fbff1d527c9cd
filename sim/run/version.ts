/** Version of the program that results and saved runs name; the same as in package.json. */
export const VERSION = '0.1.0';
