/** The part of autocannon that the benches use; the package has no types of its own. */
declare module "autocannon" {
  type Request = { body?: string; [key: string]: unknown };
  type Options = {
    url: string;
    method?: string;
    connections?: number;
    duration?: number;
    headers?: Record<string, string>;
    requests?: { setupRequest: (request: Request) => Request }[];
  };
  type Result = {
    non2xx: number;
    errors: number;
    requests: { average: number };
    latency: { p50: number; p99: number };
  };
  export default function autocannon(options: Options): Promise<Result>;
}
