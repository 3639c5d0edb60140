/** Most characters of a remark on one glass. Apart from the schema, which would bring its library to the phone. */
export const COMMENT_MAX = 1000;
