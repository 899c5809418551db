import { createRouteHandler } from "uploadthing/next";
import { uploads } from "@/lib/storage/uploads";

// the route's own settings come from the UPLOADTHING_* environment when it is first called
export const { GET, POST } = createRouteHandler({ router: uploads });
