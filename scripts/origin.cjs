/** The place the add-in is served from: the one address that the manifest, the help links and the metadata hold. */
const LOCAL_ORIGIN = 'https://localhost:3000';

/** `--env origin=…` -> an https address without a trailing slash; throws in words when it is none. */
function readOrigin(text) {
  if (text === undefined) return LOCAL_ORIGIN;
  let url;
  try {
    url = new URL(String(text));
  } catch {
    throw new Error(`--env origin must be an address such as https://host/path, found "${text}".`);
  }
  if (url.protocol !== 'https:') {
    throw new Error(`--env origin must begin with https:// (the host loads nothing else), found "${text}".`);
  }
  if (url.search || url.hash || url.username || url.password) {
    throw new Error(`--env origin must hold a host and a path only, found "${text}".`);
  }
  return (url.origin + url.pathname).replace(/\/+$/, '');
}

module.exports = { LOCAL_ORIGIN, readOrigin };
