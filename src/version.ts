/** The program's version; a test holds it against package.json. */
export const PROGRAM_VERSION = '0.1.0';
