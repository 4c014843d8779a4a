/** Counts answers for Prometheus: by method and status, with the time they took. No names, no figures of a workshop. */
import type { RequestHandler } from 'express';

export interface Metrics {
  readonly count: RequestHandler;
  readonly page: RequestHandler;
}

export function metrics(): Metrics {
  const answers = new Map<string, { count: number; seconds: number }>();
  return {
    count(request, response, next) {
      const begun = process.hrtime.bigint();
      response.on('finish', () => {
        const key = `method="${request.method}",status="${response.statusCode}"`;
        const seconds = Number(process.hrtime.bigint() - begun) / 1e9;
        const known = answers.get(key) ?? { count: 0, seconds: 0 };
        answers.set(key, { count: known.count + 1, seconds: known.seconds + seconds });
      });
      next();
    },
    page(_request, response) {
      const lines = [...answers].flatMap(([key, { count, seconds }]) => [
        `grainward_answers_total{${key}} ${count}`,
        `grainward_answer_seconds_sum{${key}} ${seconds.toFixed(6)}`,
      ]);
      response
        .type('text/plain; version=0.0.4')
        .send(
          `# TYPE grainward_answers_total counter\n# TYPE grainward_answer_seconds_sum counter\n${lines.join('\n')}\nprocess_uptime_seconds ${process.uptime().toFixed(0)}\n`,
        );
    },
  };
}
