// The entry of the edge service. Files of the page are answered from here, since
// for each call of the core a new instance of it starts.

import core from "./worker.mjs";
import { files } from "./site.mjs";

const messages = "/v1/message";

// For now the service is for this machine only; a name of another kind means
// that some site has had its own name point here.
const here = new Set(["127.0.0.1", "localhost", "[::1]"]);

const bare = {
  "Cache-Control": "no-store",
  "Content-Security-Policy": "default-src 'none'; frame-ancestors 'none'",
  "Referrer-Policy": "no-referrer",
  "X-Content-Type-Options": "nosniff",
};

function page(request, path) {
  const file = files[path === "/" ? "/index.html" : path];
  if (file === undefined) {
    return new Response(null, { status: 404, headers: bare });
  }
  if (request.method !== "GET" && request.method !== "HEAD") {
    return new Response(null, { status: 405, headers: { ...bare, Allow: "GET, HEAD" } });
  }
  return new Response(request.method === "GET" ? file.content : null, { headers: file.headers });
}

export default {
  async fetch(request, environment, context) {
    const { hostname, pathname } = new URL(request.url);
    if (!here.has(hostname)) {
      return new Response(null, { status: 421, headers: bare });
    }
    if (pathname === messages) {
      return core.fetch(request, environment, context);
    }
    return page(request, pathname);
  },
};
