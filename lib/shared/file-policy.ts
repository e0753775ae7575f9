/** What people made or sent: opened by its own address it is a picture or a sheet of paper, and can do nothing. */
export const FILE_POLICY = `sandbox; default-src 'none'; style-src 'unsafe-inline'; font-src data:`;
