import { z } from "zod";
import { env } from "@/lib/env";
import { apiError, rangeFitRequest, rangeFitResponse, vocalLinesResponse } from "@/lib/schemas/api";

const json = (schema: z.ZodType, io: "input" | "output") => ({
  "application/json": { schema: z.toJSONSchema(schema, { io, target: "draft-2020-12" }) },
});
const refusals = Object.fromEntries(
  (
    [
      ["400", "Not JSON, or not of the form"],
      ["401", "No token, or one that is not known"],
      ["413", "Too large"],
      ["415", "Not that kind of file"],
      ["422", "Understood, and refused"],
      ["429", "Too often; see Retry-After"],
    ] as const
  ).map(([status, description]) => [status, { description, content: json(apiError, "output") }]),
);

/** The description of the public API, made from the schemas that validate it. */
export function GET(): Response {
  return Response.json({
    openapi: "3.1.0",
    info: {
      title: "Cembalo",
      version: "1",
      description:
        "The arithmetic of a music director's season. Pitches are MIDI numbers (60 is C4). Nothing is stored.",
    },
    servers: [{ url: `${env().AUTH_URL}/api/v1` }],
    security: [{ token: [] }],
    components: {
      securitySchemes: {
        token: {
          type: "http",
          scheme: "bearer",
          description: "A personal token, made on the account page",
        },
      },
    },
    paths: {
      "/vocal-lines": {
        post: {
          summary: "What each part of a MusicXML score sings",
          requestBody: {
            required: true,
            content: {
              "multipart/form-data": {
                schema: {
                  type: "object",
                  required: ["file"],
                  properties: {
                    file: {
                      type: "string",
                      format: "binary",
                      description: ".musicxml, .xml or .mxl, at most 20 MB",
                    },
                  },
                },
              },
            },
          },
          responses: {
            "200": {
              description: "Ranges, histograms and quantiles by part",
              content: json(vocalLinesResponse, "output"),
            },
            ...refusals,
          },
        },
      },
      "/range-fit": {
        post: {
          summary: "How one singer's range meets one vocal line",
          requestBody: { required: true, content: json(rangeFitRequest, "input") },
          responses: {
            "200": {
              description: "The fit; reserves and shift after Herbst et al. 2012",
              content: json(rangeFitResponse, "output"),
            },
            ...refusals,
          },
        },
      },
    },
  });
}
