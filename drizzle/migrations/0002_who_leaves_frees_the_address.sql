DROP INDEX `users_email_unique`;--> statement-breakpoint
ALTER TABLE `users` ADD `last_seen_at` integer;--> statement-breakpoint
UPDATE `users` SET `last_seen_at` = (SELECT max(`last_seen_at`) FROM `sessions` WHERE `sessions`.`user_id` = `users`.`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `users_email` ON `users` (`email`) WHERE "users"."left_at" is null;
