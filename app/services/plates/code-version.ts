/** Version of this program as plates name it: that of package.json, which a test compares. */
export const CODE_VERSION = "0.1.0";
