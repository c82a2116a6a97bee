-- What happened is kept: these rows are only ever added.
CREATE TRIGGER answers_no_update BEFORE UPDATE ON answers BEGIN SELECT RAISE(ABORT, 'answers is append-only'); END;
--> statement-breakpoint
CREATE TRIGGER answers_no_delete BEFORE DELETE ON answers BEGIN SELECT RAISE(ABORT, 'answers is append-only'); END;
--> statement-breakpoint
CREATE TRIGGER watched_stretches_no_update BEFORE UPDATE ON watched_stretches BEGIN SELECT RAISE(ABORT, 'watched_stretches is append-only'); END;
--> statement-breakpoint
CREATE TRIGGER watched_stretches_no_delete BEFORE DELETE ON watched_stretches BEGIN SELECT RAISE(ABORT, 'watched_stretches is append-only'); END;
--> statement-breakpoint
CREATE TRIGGER sign_offs_no_update BEFORE UPDATE ON sign_offs BEGIN SELECT RAISE(ABORT, 'sign_offs is append-only'); END;
--> statement-breakpoint
CREATE TRIGGER sign_offs_no_delete BEFORE DELETE ON sign_offs BEGIN SELECT RAISE(ABORT, 'sign_offs is append-only'); END;
--> statement-breakpoint
CREATE TRIGGER sign_off_revocations_no_update BEFORE UPDATE ON sign_off_revocations BEGIN SELECT RAISE(ABORT, 'sign_off_revocations is append-only'); END;
--> statement-breakpoint
CREATE TRIGGER sign_off_revocations_no_delete BEFORE DELETE ON sign_off_revocations BEGIN SELECT RAISE(ABORT, 'sign_off_revocations is append-only'); END;
--> statement-breakpoint
CREATE TRIGGER checks_no_update BEFORE UPDATE ON checks BEGIN SELECT RAISE(ABORT, 'checks is append-only'); END;
--> statement-breakpoint
CREATE TRIGGER checks_no_delete BEFORE DELETE ON checks BEGIN SELECT RAISE(ABORT, 'checks is append-only'); END;
--> statement-breakpoint
CREATE TRIGGER revisions_no_update BEFORE UPDATE ON revisions BEGIN SELECT RAISE(ABORT, 'revisions is append-only'); END;
--> statement-breakpoint
CREATE TRIGGER revisions_no_delete BEFORE DELETE ON revisions BEGIN SELECT RAISE(ABORT, 'revisions is append-only'); END;
--> statement-breakpoint
CREATE TRIGGER audit_log_no_update BEFORE UPDATE ON audit_log BEGIN SELECT RAISE(ABORT, 'audit_log is append-only'); END;
--> statement-breakpoint
CREATE TRIGGER audit_log_no_delete BEFORE DELETE ON audit_log BEGIN SELECT RAISE(ABORT, 'audit_log is append-only'); END;
--> statement-breakpoint
CREATE TRIGGER question_versions_no_update BEFORE UPDATE ON question_versions BEGIN SELECT RAISE(ABORT, 'question_versions is append-only'); END;
--> statement-breakpoint
CREATE TRIGGER question_versions_no_delete BEFORE DELETE ON question_versions BEGIN SELECT RAISE(ABORT, 'question_versions is append-only'); END;
--> statement-breakpoint
CREATE TRIGGER attempts_no_change_after_submit BEFORE UPDATE ON attempts WHEN old.submitted_at IS NOT NULL BEGIN SELECT RAISE(ABORT, 'a submitted attempt never changes'); END;
--> statement-breakpoint
CREATE TRIGGER attempts_no_delete BEFORE DELETE ON attempts BEGIN SELECT RAISE(ABORT, 'attempts are kept'); END;
--> statement-breakpoint
CREATE TRIGGER cues_no_change_when_published BEFORE UPDATE ON cues WHEN (SELECT published_at FROM caption_tracks WHERE id = old.track_id) IS NOT NULL BEGIN SELECT RAISE(ABORT, 'a published caption track never changes'); END;
--> statement-breakpoint
CREATE TRIGGER cues_no_delete_when_published BEFORE DELETE ON cues WHEN (SELECT published_at FROM caption_tracks WHERE id = old.track_id) IS NOT NULL BEGIN SELECT RAISE(ABORT, 'a published caption track never changes'); END;
--> statement-breakpoint
CREATE TRIGGER cues_no_insert_when_published BEFORE INSERT ON cues WHEN (SELECT published_at FROM caption_tracks WHERE id = new.track_id) IS NOT NULL BEGIN SELECT RAISE(ABORT, 'a published caption track never changes'); END;
--> statement-breakpoint
-- Words of published captions, one row a cue; the rowid is only the table's own.
CREATE VIRTUAL TABLE caption_words USING fts5(words, shop_id UNINDEXED, lesson_id UNINDEXED, recording_id UNINDEXED, cue_id UNINDEXED, start_ms UNINDEXED, tokenize = 'porter unicode61 remove_diacritics 2');
