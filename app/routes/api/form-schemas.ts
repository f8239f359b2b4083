import { z } from "zod";

/** What the forms outside of /api/v1 answer in JSON, but for plates themselves. */

/** Source: oEmbed 1.0, https://oembed.com, section 2.3.4.4 (from memory, not seen). */
export const oembedShape = z.object({
  version: z.literal("1.0"),
  type: z.literal("rich"),
  title: z.string(),
  author_name: z.string(),
  provider_name: z.string(),
  provider_url: z.string(),
  cache_age: z.number().int().describe("Seconds"),
  thumbnail_url: z.string(),
  thumbnail_width: z.number().int().describe("Pixels"),
  thumbnail_height: z.number().int(),
  html: z.string().describe("A frame to be put into a page"),
  width: z.number().int().describe("Of the frame, pixels"),
  height: z.number().int(),
});
