DROP INDEX `messages_fallback` ON `messages`;--> statement-breakpoint
DROP INDEX `messages_claim` ON `messages`;--> statement-breakpoint
ALTER TABLE `messages` ADD `claims` int DEFAULT 0 NOT NULL;--> statement-breakpoint
ALTER TABLE `messages` ADD `address` varchar(200);--> statement-breakpoint
ALTER TABLE `messages` ADD `unproven_since` datetime(3);--> statement-breakpoint
ALTER TABLE `messages` ADD `fallback_of_id` varchar(16) character set ascii collate ascii_bin;--> statement-breakpoint
CREATE INDEX `messages_unproven` ON `messages` (`unproven_since`);--> statement-breakpoint
CREATE INDEX `messages_claim` ON `messages` (`state`,`channel`,`priority`,`site_id`,`run_at`,`id`);--> statement-breakpoint
ALTER TABLE `senders` DROP COLUMN `window_started_at`;--> statement-breakpoint
ALTER TABLE `senders` DROP COLUMN `sent_in_window`;