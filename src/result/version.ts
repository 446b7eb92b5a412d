/** The version of the tool that a result names; a test holds it equal to package.json. */
export const version = '0.1.0';
