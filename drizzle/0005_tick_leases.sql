ALTER TABLE `ticks` ADD `locked_by` varchar(60) character set ascii collate ascii_bin;--> statement-breakpoint
ALTER TABLE `ticks` ADD `locked_until` datetime(3);--> statement-breakpoint
ALTER TABLE `messages` DROP COLUMN `fallback_of_id`;