declare const noun: unique symbol;

/** An id of one kind of thing: ids of different nouns do not mix. Sortable by time (ULID). */
export type Id<Noun extends string> = string & { readonly [noun]: Noun };

export type ShopId = Id<"shop">;
export type UserId = Id<"user">;
export type VehicleId = Id<"vehicle">;
export type DocumentId = Id<"document">;
export type CitationId = Id<"citation">;
export type RecordingId = Id<"recording">;
export type CaptionTrackId = Id<"captionTrack">;
export type LessonId = Id<"lesson">;
export type ClipId = Id<"clip">;
export type ChapterId = Id<"chapter">;
export type MarkId = Id<"mark">;
export type RevisionId = Id<"revision">;
export type QuestionId = Id<"question">;
export type QuestionVersionId = Id<"questionVersion">;
export type AttemptId = Id<"attempt">;
export type AssignmentId = Id<"assignment">;
export type SignOffId = Id<"signOff">;
export type SignOffRequestId = Id<"signOffRequest">;
export type InvitationId = Id<"invitation">;
export type SessionId = Id<"session">;
export type TaskId = Id<"task">;
export type DoubtId = Id<"doubt">;
