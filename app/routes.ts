import { index, layout, prefix, route, type RouteConfig } from "@react-router/dev/routes";

export default [
  // Before sign-in.
  route("sign-up", "routes/auth/sign-up.tsx"),
  route("sign-in", "routes/auth/sign-in.tsx"),
  route("sign-out", "routes/auth/sign-out.ts"),
  route("forgot-password", "routes/auth/forgot-password.tsx"),
  route("reset-password/:token", "routes/auth/reset-password.tsx"),
  route("invitation/:token", "routes/auth/invitation.tsx"),

  // Signed-in pages: the shell carries the middleware that sets the Scope.
  layout("routes/shell.tsx", [
    // Everybody: find, watch.
    index("routes/library/library.tsx"),
    route("search", "routes/library/search.tsx"),
    route("lessons/:lessonId", "routes/library/lesson.tsx"),
    route("recordings/:recordingId/play", "routes/library/play.ts"),
    route("recordings/:recordingId/:what", "routes/library/picture.ts"),
    route("lessons/:lessonId/values/:markId/wrong", "routes/library/looks-wrong.tsx"),

    // Each person: what to learn, what is learned.
    route("training", "routes/training/my-training.tsx"),
    route("lessons/:lessonId/quiz", "routes/training/quiz.tsx"),
    route("training/attempts/:attemptId", "routes/training/attempt.tsx"),
    route("training/attempts/:attemptId/review", "routes/training/attempt-review.tsx"),
    route("training/attempts/:attemptId/result", "routes/training/attempt-result.tsx"),
    route("training/sign-off-requests/new", "routes/training/sign-off-request.tsx"),

    // Who teaches: assign, sign off, see who has shown what.
    route("training/assign", "routes/training/assign.tsx"),
    route("training/sign-offs", "routes/training/sign-offs.tsx"),
    route("training/people/:userId/lessons/:lessonId/sign-off", "routes/training/sign-off.tsx"),
    route("skills", "routes/training/skills.tsx"),
    route("skills/:userId/:lessonId", "routes/training/skill.tsx"),

    // Instructors and owners: from recording to lesson.
    route("bench", "routes/bench/bench.tsx"),
    route("bench/recordings", "routes/bench/recordings.tsx"),
    route("bench/recordings/upload", "routes/bench/upload.tsx"),
    route("bench/lessons/new", "routes/bench/lesson-new.tsx"),
    route("bench/lessons/:lessonId", "routes/bench/lesson.tsx"),
    route("bench/lessons/:lessonId/marks/new", "routes/bench/mark-new.tsx"),
    route("bench/lessons/:lessonId/marks/:markId", "routes/bench/mark.tsx"),
    route("bench/lessons/:lessonId/questions", "routes/bench/questions.tsx"),
    route("bench/lessons/:lessonId/captions", "routes/bench/captions.tsx"),
    route("bench/lessons/:lessonId/captions/:trackId/original", "routes/bench/caption-original.ts"),
    route("bench/lessons/:lessonId/check", "routes/bench/check.tsx"),
    route("bench/lessons/:lessonId/publish", "routes/bench/publish.tsx"),
    route("bench/lessons/:lessonId/revisions/:n", "routes/bench/revision.tsx"),
    route("bench/doubts", "routes/bench/doubts.tsx"),
    route("bench/doubts/:doubtId", "routes/bench/doubt.tsx"),

    // Owners: people, shop.
    route("account", "routes/team/account.tsx"),
    route("team", "routes/team/team.tsx"),
    route("settings", "routes/team/settings.tsx"),
    route("settings/tasks", "routes/team/tasks.tsx"),
    route("settings/audit", "routes/team/audit.tsx"),

    // Answers for programs, not pages.
    ...prefix("api", [
      route("lessons/:lessonId/captions/:trackId.vtt", "routes/api/caption-track.ts"),
      route("lessons/:lessonId/chapters.vtt", "routes/api/chapters.ts"),
      route("units", "routes/api/units.ts"),
      route("search", "routes/api/search.ts"),
      route("watched", "routes/api/watched.ts"),
      route("uploads", "routes/api/uploads.ts"),
      route("uploads/:recordingId", "routes/api/upload.ts"),
      route("uploads/:recordingId/pictures", "routes/api/upload-pictures.ts"),
      route("recordings/:recordingId/link", "routes/api/recording-link.ts"),
    ]),
  ]),

  route("healthz", "routes/api/health.ts"),
  route("*", "routes/not-found.tsx"),
] satisfies RouteConfig;
