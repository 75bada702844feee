CREATE TABLE `stray_texts` (
	`entry_id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`organisation_id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`priority` int NOT NULL,
	`due_at` datetime(3) NOT NULL,
	`settled_at` datetime(3),
	`settled_by` varchar(16) character set ascii collate ascii_bin,
	`settled_as` varchar(10) character set ascii collate ascii_bin,
	`reason` varchar(200),
	`follow_up_id` varchar(16) character set ascii collate ascii_bin,
	CONSTRAINT `stray_texts_entry_id` PRIMARY KEY(`entry_id`)
);
--> statement-breakpoint
ALTER TABLE `stray_texts` ADD CONSTRAINT `stray_texts_entry_id_thread_entries_id_fk` FOREIGN KEY (`entry_id`) REFERENCES `thread_entries`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `stray_texts` ADD CONSTRAINT `stray_texts_organisation_id_organisations_id_fk` FOREIGN KEY (`organisation_id`) REFERENCES `organisations`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `stray_texts` ADD CONSTRAINT `stray_texts_settled_by_staff_id_fk` FOREIGN KEY (`settled_by`) REFERENCES `staff`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `stray_texts` ADD CONSTRAINT `stray_texts_follow_up_id_follow_ups_id_fk` FOREIGN KEY (`follow_up_id`) REFERENCES `follow_ups`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX `stray_texts_owed` ON `stray_texts` (`organisation_id`,`settled_at`,`priority`,`due_at`);