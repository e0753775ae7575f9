/**
 * The name of the cookie that names a session. `__Host-` keeps it from other hosts of the domain; browsers accept that
 * over https only. No other cookie's name begins with this one: next-auth would read it as a further piece of this.
 */
export const sessionCookieName = (isHttps: boolean): string => (isHttps ? '__Host-session.ohmstead' : 'session.ohmstead');
