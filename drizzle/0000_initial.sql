CREATE TABLE `alerts` (
	`id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`follow_up_id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`kind` varchar(32) character set ascii collate ascii_bin NOT NULL,
	`role` varchar(20) character set ascii collate ascii_bin NOT NULL,
	`site_id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`staff_id` varchar(16) character set ascii collate ascii_bin,
	`due_at` datetime(3) NOT NULL,
	`climb` int NOT NULL DEFAULT 0,
	`climb_at` datetime(3),
	`detail` varchar(500) NOT NULL,
	`dedupe_key` varchar(120) character set ascii collate ascii_bin NOT NULL,
	`raised_at` datetime(3) NOT NULL,
	`settled_at` datetime(3),
	`settled_by` varchar(16) character set ascii collate ascii_bin,
	`settled_how` varchar(300),
	CONSTRAINT `alerts_id` PRIMARY KEY(`id`),
	CONSTRAINT `alerts_dedupe` UNIQUE(`dedupe_key`)
);
--> statement-breakpoint
CREATE TABLE `attempts` (
	`id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`follow_up_id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`round` int NOT NULL,
	`channel` varchar(12) character set ascii collate ascii_bin NOT NULL,
	`carer_id` varchar(16) character set ascii collate ascii_bin,
	`outcome` varchar(20) character set ascii collate ascii_bin NOT NULL,
	`note` varchar(500),
	`staff_id` varchar(16) character set ascii collate ascii_bin,
	`at` datetime(3) NOT NULL,
	CONSTRAINT `attempts_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `check_ins` (
	`id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`follow_up_id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`carer_id` varchar(16) character set ascii collate ascii_bin,
	`answers` json NOT NULL,
	`result` varchar(12) character set ascii collate ascii_bin NOT NULL,
	`reasons` json NOT NULL,
	`answered_at` datetime(3) NOT NULL,
	`submission_key` varchar(40) character set ascii collate ascii_bin NOT NULL,
	CONSTRAINT `check_ins_id` PRIMARY KEY(`id`),
	CONSTRAINT `check_ins_once` UNIQUE(`follow_up_id`,`submission_key`)
);
--> statement-breakpoint
CREATE TABLE `decisions` (
	`id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`follow_up_id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`round` int NOT NULL,
	`measurement_id` varchar(16) character set ascii collate ascii_bin,
	`standard` varchar(20) character set ascii collate ascii_bin NOT NULL,
	`edition` varchar(60) NOT NULL,
	`recommended` varchar(20) character set ascii collate ascii_bin NOT NULL,
	`chosen` varchar(20) character set ascii collate ascii_bin NOT NULL,
	`is_override` boolean NOT NULL,
	`reason` varchar(600),
	`assessment` json NOT NULL,
	`decided_by` varchar(16) character set ascii collate ascii_bin,
	`decided_at` datetime(3) NOT NULL,
	CONSTRAINT `decisions_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `follow_ups` (
	`id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`newborn_id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`birth_site_id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`clinic_id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`stage` varchar(20) character set ascii collate ascii_bin NOT NULL,
	`round` int NOT NULL DEFAULT 1,
	`planned_discharge_at` datetime(3) NOT NULL,
	`handed_over_at` datetime(3),
	`next_step` varchar(24) character set ascii collate ascii_bin,
	`next_step_role` varchar(20) character set ascii collate ascii_bin,
	`next_step_site_id` varchar(16) character set ascii collate ascii_bin,
	`next_step_staff_id` varchar(16) character set ascii collate ascii_bin,
	`next_step_due_at` datetime(3),
	`next_step_climb` int NOT NULL DEFAULT 0,
	`next_step_climb_at` datetime(3),
	`standard` varchar(20) character set ascii collate ascii_bin NOT NULL,
	`disposition` varchar(20) character set ascii collate ascii_bin,
	`window_from_at` datetime(3),
	`window_until_at` datetime(3),
	`window_test` varchar(24) character set ascii collate ascii_bin,
	`later_check_at` datetime(3),
	`later_check_asks` varchar(200),
	`outcome` varchar(24) character set ascii collate ascii_bin,
	`closed_at` datetime(3),
	`closed_by` varchar(16) character set ascii collate ascii_bin,
	`merged_into_id` varchar(16) character set ascii collate ascii_bin,
	`version` int NOT NULL DEFAULT 1,
	`created_at` datetime(3) NOT NULL,
	`updated_at` datetime(3) NOT NULL,
	CONSTRAINT `follow_ups_id` PRIMARY KEY(`id`),
	CONSTRAINT `follow_ups_one_next_step` CHECK((`follow_ups`.`stage` = 'closed' and `follow_ups`.`next_step` is null and `follow_ups`.`next_step_role` is null and `follow_ups`.`next_step_site_id` is null and `follow_ups`.`next_step_due_at` is null and `follow_ups`.`next_step_climb_at` is null and `follow_ups`.`outcome` is not null and `follow_ups`.`closed_at` is not null) or (`follow_ups`.`stage` <> 'closed' and `follow_ups`.`next_step` is not null and `follow_ups`.`next_step_role` is not null and `follow_ups`.`next_step_site_id` is not null and `follow_ups`.`next_step_due_at` is not null and `follow_ups`.`outcome` is null and `follow_ups`.`closed_at` is null)),
	CONSTRAINT `follow_ups_window` CHECK((`follow_ups`.`window_from_at` is null) = (`follow_ups`.`window_until_at` is null) and (`follow_ups`.`window_from_at` is null or `follow_ups`.`window_from_at` <= `follow_ups`.`window_until_at`))
);
--> statement-breakpoint
CREATE TABLE `parent_links` (
	`id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`follow_up_id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`carer_id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`token_hash` varchar(64) character set ascii collate ascii_bin NOT NULL,
	`expires_at` datetime(3) NOT NULL,
	`revoked_at` datetime(3),
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `parent_links_id` PRIMARY KEY(`id`),
	CONSTRAINT `parent_links_token` UNIQUE(`token_hash`),
	CONSTRAINT `parent_links_carer` UNIQUE(`follow_up_id`,`carer_id`)
);
--> statement-breakpoint
CREATE TABLE `transitions` (
	`id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`follow_up_id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`kind` varchar(24) character set ascii collate ascii_bin NOT NULL,
	`from_stage` varchar(20) character set ascii collate ascii_bin,
	`to_stage` varchar(20) character set ascii collate ascii_bin NOT NULL,
	`actor_kind` varchar(12) character set ascii collate ascii_bin NOT NULL,
	`actor_id` varchar(60) character set ascii collate ascii_bin,
	`why` varchar(600),
	`detail` json NOT NULL,
	`at` datetime(3) NOT NULL,
	`sequence` int NOT NULL,
	CONSTRAINT `transitions_id` PRIMARY KEY(`id`),
	CONSTRAINT `transitions_sequence` UNIQUE(`follow_up_id`,`sequence`)
);
--> statement-breakpoint
CREATE TABLE `visits` (
	`id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`follow_up_id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`clinic_id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`round` int NOT NULL,
	`kind` varchar(20) character set ascii collate ascii_bin NOT NULL,
	`starts_at` datetime(3) NOT NULL,
	`ends_at` datetime(3) NOT NULL,
	`place_number` int NOT NULL,
	`holds_place` boolean,
	`is_open` boolean,
	`state` varchar(12) character set ascii collate ascii_bin NOT NULL,
	`is_outside_window` boolean NOT NULL DEFAULT false,
	`outside_window_why` varchar(300),
	`calendar_sequence` int NOT NULL DEFAULT 0,
	`calendar_uid` varchar(60) character set ascii collate ascii_bin NOT NULL,
	`booked_by` varchar(16) character set ascii collate ascii_bin,
	`booked_at` datetime(3) NOT NULL,
	`confirmed_at` datetime(3),
	`confirmed_via` varchar(12) character set ascii collate ascii_bin,
	`arrived_at` datetime(3),
	`ended_at` datetime(3),
	`other_time_asked_at` datetime(3),
	`other_time_wish` varchar(300),
	CONSTRAINT `visits_id` PRIMARY KEY(`id`),
	CONSTRAINT `visits_place` UNIQUE(`clinic_id`,`starts_at`,`place_number`,`holds_place`),
	CONSTRAINT `visits_one_open` UNIQUE(`follow_up_id`,`is_open`),
	CONSTRAINT `visits_marks` CHECK((`visits`.`holds_place` is null or `visits`.`holds_place` = 1) and (`visits`.`is_open` is null or (`visits`.`is_open` = 1 and `visits`.`holds_place` = 1)))
);
--> statement-breakpoint
CREATE TABLE `calendar_feeds` (
	`id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`staff_id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`site_id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`token_hash` varchar(64) character set ascii collate ascii_bin NOT NULL,
	`created_at` datetime(3) NOT NULL,
	`revoked_at` datetime(3),
	CONSTRAINT `calendar_feeds_id` PRIMARY KEY(`id`),
	CONSTRAINT `calendar_feeds_token` UNIQUE(`token_hash`)
);
--> statement-breakpoint
CREATE TABLE `message_templates` (
	`id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`organisation_id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`kind` varchar(32) character set ascii collate ascii_bin NOT NULL,
	`channel` varchar(6) character set ascii collate ascii_bin NOT NULL,
	`language` varchar(5) character set ascii collate ascii_bin NOT NULL,
	`version` int NOT NULL,
	`subject` varchar(200),
	`body` text NOT NULL,
	`standing` varchar(10) character set ascii collate ascii_bin NOT NULL,
	`reviewed_by` varchar(120),
	`is_current` boolean,
	`created_by` varchar(16) character set ascii collate ascii_bin,
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `message_templates_id` PRIMARY KEY(`id`),
	CONSTRAINT `message_templates_version` UNIQUE(`organisation_id`,`kind`,`channel`,`language`,`version`),
	CONSTRAINT `message_templates_current` UNIQUE(`organisation_id`,`kind`,`channel`,`language`,`is_current`)
);
--> statement-breakpoint
CREATE TABLE `messages` (
	`id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`follow_up_id` varchar(16) character set ascii collate ascii_bin,
	`site_id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`carer_id` varchar(16) character set ascii collate ascii_bin,
	`kind` varchar(32) character set ascii collate ascii_bin NOT NULL,
	`occasion` varchar(60) character set ascii collate ascii_bin NOT NULL,
	`channel` varchar(6) character set ascii collate ascii_bin NOT NULL,
	`language` varchar(5) character set ascii collate ascii_bin NOT NULL,
	`dedupe_key` varchar(160) character set ascii collate ascii_bin NOT NULL,
	`template_id` varchar(16) character set ascii collate ascii_bin,
	`facts` json NOT NULL,
	`state` varchar(12) character set ascii collate ascii_bin NOT NULL,
	`priority` int NOT NULL,
	`run_at` datetime(3) NOT NULL,
	`expires_at` datetime(3) NOT NULL,
	`locked_by` varchar(60) character set ascii collate ascii_bin,
	`locked_until` datetime(3),
	`attempts` int NOT NULL DEFAULT 0,
	`call_began_at` datetime(3),
	`last_error` varchar(300),
	`provider_id` varchar(80) character set ascii collate ascii_bin,
	`sent_at` datetime(3),
	`delivery` varchar(16) character set ascii collate ascii_bin,
	`delivery_at` datetime(3),
	`delivery_error` varchar(120),
	`fell_back_at` datetime(3),
	`created_at` datetime(3) NOT NULL,
	`updated_at` datetime(3) NOT NULL,
	CONSTRAINT `messages_id` PRIMARY KEY(`id`),
	CONSTRAINT `messages_dedupe` UNIQUE(`dedupe_key`)
);
--> statement-breakpoint
CREATE TABLE `provider_events` (
	`id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`provider` varchar(10) character set ascii collate ascii_bin NOT NULL,
	`event_key` varchar(120) character set ascii collate ascii_bin NOT NULL,
	`kind` varchar(12) character set ascii collate ascii_bin NOT NULL,
	`payload` json NOT NULL,
	`received_at` datetime(3) NOT NULL,
	`handled_at` datetime(3),
	CONSTRAINT `provider_events_id` PRIMARY KEY(`id`),
	CONSTRAINT `provider_events_once` UNIQUE(`provider`,`event_key`)
);
--> statement-breakpoint
CREATE TABLE `senders` (
	`id` varchar(40) character set ascii collate ascii_bin NOT NULL,
	`paused_until` datetime(3),
	`failures_in_a_row` int NOT NULL DEFAULT 0,
	`window_started_at` datetime(3),
	`sent_in_window` int NOT NULL DEFAULT 0,
	CONSTRAINT `senders_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `thread_entries` (
	`id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`follow_up_id` varchar(16) character set ascii collate ascii_bin,
	`carer_id` varchar(16) character set ascii collate ascii_bin,
	`phone` varchar(20) character set ascii collate ascii_bin,
	`direction` varchar(4) character set ascii collate ascii_bin NOT NULL,
	`body` text NOT NULL,
	`understood_as` varchar(20) character set ascii collate ascii_bin,
	`is_alarming` boolean NOT NULL DEFAULT false,
	`staff_id` varchar(16) character set ascii collate ascii_bin,
	`message_id` varchar(16) character set ascii collate ascii_bin,
	`provider_id` varchar(80) character set ascii collate ascii_bin,
	`read_at` datetime(3),
	`read_by` varchar(16) character set ascii collate ascii_bin,
	`at` datetime(3) NOT NULL,
	CONSTRAINT `thread_entries_id` PRIMARY KEY(`id`),
	CONSTRAINT `thread_entries_provider` UNIQUE(`provider_id`)
);
--> statement-breakpoint
CREATE TABLE `ticks` (
	`name` varchar(40) character set ascii collate ascii_bin NOT NULL,
	`last_run_at` datetime(3) NOT NULL,
	`last_took_milliseconds` int,
	`last_error` varchar(300),
	CONSTRAINT `ticks_name` PRIMARY KEY(`name`)
);
--> statement-breakpoint
CREATE TABLE `watch_findings` (
	`id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`kind` varchar(32) character set ascii collate ascii_bin NOT NULL,
	`subject` varchar(80) character set ascii collate ascii_bin NOT NULL,
	`site_id` varchar(16) character set ascii collate ascii_bin,
	`detail` varchar(300) NOT NULL,
	`found_at` datetime(3) NOT NULL,
	`mailed_at` datetime(3),
	`settled_at` datetime(3),
	CONSTRAINT `watch_findings_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `workers` (
	`id` varchar(60) character set ascii collate ascii_bin NOT NULL,
	`started_at` datetime(3) NOT NULL,
	`heard_at` datetime(3) NOT NULL,
	`stopped_at` datetime(3),
	CONSTRAINT `workers_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `carers` (
	`id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`newborn_id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`call_order` int NOT NULL,
	`name` varchar(120) NOT NULL,
	`relation` varchar(60) NOT NULL,
	`phone` varchar(20) character set ascii collate ascii_bin,
	`email` varchar(200),
	`language` varchar(5) character set ascii collate ascii_bin NOT NULL,
	`consents_to_sms` boolean NOT NULL,
	`consents_to_mail` boolean NOT NULL,
	`consented_at` datetime(3),
	`sms_stopped_at` datetime(3),
	`mail_stopped_at` datetime(3),
	CONSTRAINT `carers_id` PRIMARY KEY(`id`),
	CONSTRAINT `carers_order` UNIQUE(`newborn_id`,`call_order`)
);
--> statement-breakpoint
CREATE TABLE `measurements` (
	`id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`newborn_id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`method` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`measured_at` datetime(3) NOT NULL,
	`total` decimal(6,2) NOT NULL,
	`direct` decimal(6,2),
	`unit` varchar(8) character set ascii collate ascii_bin NOT NULL,
	`status` varchar(20) character set ascii collate ascii_bin NOT NULL,
	`struck_because` varchar(200),
	`recorded_at` datetime(3) NOT NULL,
	`recorded_by` varchar(16) character set ascii collate ascii_bin,
	CONSTRAINT `measurements_id` PRIMARY KEY(`id`),
	CONSTRAINT `measurements_total` CHECK(`measurements`.`total` > 0 and (`measurements`.`direct` is null or (`measurements`.`direct` >= 0 and `measurements`.`direct` <= `measurements`.`total`)))
);
--> statement-breakpoint
CREATE TABLE `newborns` (
	`id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`organisation_id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`birth_site_id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`record_number` varchar(40) NOT NULL,
	`family_name` varchar(120) NOT NULL,
	`given_name` varchar(120) NOT NULL,
	`born_at` datetime(3) NOT NULL,
	`birth_time_zone` varchar(60) character set ascii collate ascii_bin NOT NULL,
	`born_on` date NOT NULL,
	`gestation_weeks` int NOT NULL,
	`gestation_days` int NOT NULL,
	`feeding` varchar(10) character set ascii collate ascii_bin NOT NULL,
	`birth_weight_grams` int,
	`neurotoxicity_risks` json NOT NULL,
	`jaundice_risks` json NOT NULL,
	`albumin_grams_per_decilitre` decimal(3,1),
	`direct_antiglobulin` varchar(12) character set ascii collate ascii_bin NOT NULL,
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `newborns_id` PRIMARY KEY(`id`),
	CONSTRAINT `newborns_record_number` UNIQUE(`organisation_id`,`record_number`),
	CONSTRAINT `newborns_gestation` CHECK(`newborns`.`gestation_days` between 0 and 6)
);
--> statement-breakpoint
CREATE TABLE `phototherapy_courses` (
	`id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`newborn_id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`setting` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`started_at` datetime(3) NOT NULL,
	`ended_at` datetime(3),
	`recorded_at` datetime(3) NOT NULL,
	`recorded_by` varchar(16) character set ascii collate ascii_bin,
	CONSTRAINT `phototherapy_courses_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `weights` (
	`id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`newborn_id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`weighed_at` datetime(3) NOT NULL,
	`grams` int NOT NULL,
	`recorded_at` datetime(3) NOT NULL,
	`recorded_by` varchar(16) character set ascii collate ascii_bin,
	CONSTRAINT `weights_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `closed_days` (
	`id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`site_id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`closed_on` date NOT NULL,
	`reason` varchar(160) NOT NULL,
	CONSTRAINT `closed_days_id` PRIMARY KEY(`id`),
	CONSTRAINT `closed_days_once` UNIQUE(`site_id`,`closed_on`)
);
--> statement-breakpoint
CREATE TABLE `openings` (
	`id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`site_id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`weekday` int NOT NULL,
	`from` varchar(5) character set ascii collate ascii_bin NOT NULL,
	`until` varchar(5) character set ascii collate ascii_bin NOT NULL,
	`visit_kind` varchar(20) character set ascii collate ascii_bin NOT NULL,
	`place_minutes` int NOT NULL,
	`places_at_once` int NOT NULL,
	`is_active` boolean NOT NULL DEFAULT true,
	CONSTRAINT `openings_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `organisations` (
	`id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`name` varchar(160) NOT NULL,
	`standard` varchar(20) character set ascii collate ascii_bin NOT NULL,
	`emergency_number` varchar(20) NOT NULL,
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `organisations_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `sites` (
	`id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`organisation_id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`kind` varchar(20) character set ascii collate ascii_bin NOT NULL,
	`name` varchar(160) NOT NULL,
	`address` varchar(240) NOT NULL,
	`phone` varchar(20) character set ascii collate ascii_bin NOT NULL,
	`after_hours_phone` varchar(20) character set ascii collate ascii_bin NOT NULL,
	`duty_email` varchar(200) NOT NULL,
	`time_zone` varchar(60) character set ascii collate ascii_bin NOT NULL,
	`policy` json NOT NULL,
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `sites_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `access_records` (
	`id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`organisation_id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`staff_id` varchar(16) character set ascii collate ascii_bin,
	`action` varchar(60) character set ascii collate ascii_bin NOT NULL,
	`follow_up_id` varchar(16) character set ascii collate ascii_bin,
	`detail` varchar(400),
	`at` datetime(3) NOT NULL,
	CONSTRAINT `access_records_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `invitations` (
	`id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`staff_id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`token_hash` varchar(64) character set ascii collate ascii_bin NOT NULL,
	`expires_at` datetime(3) NOT NULL,
	`used_at` datetime(3),
	`created_by` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `invitations_id` PRIMARY KEY(`id`),
	CONSTRAINT `invitations_token` UNIQUE(`token_hash`)
);
--> statement-breakpoint
CREATE TABLE `sessions` (
	`id` varchar(64) character set ascii collate ascii_bin NOT NULL,
	`user_id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`expires_at` datetime NOT NULL,
	`started_at` datetime(3) NOT NULL,
	`is_complete` boolean NOT NULL DEFAULT true,
	CONSTRAINT `sessions_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `staff` (
	`id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`organisation_id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`email` varchar(200) NOT NULL,
	`name` varchar(120) NOT NULL,
	`password_hash` varchar(200) character set ascii collate ascii_bin,
	`totp_secret` varchar(200) character set ascii collate ascii_bin,
	`totp_last_step` varchar(20) character set ascii collate ascii_bin,
	`is_disabled` boolean NOT NULL DEFAULT false,
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `staff_id` PRIMARY KEY(`id`),
	CONSTRAINT `staff_email` UNIQUE(`email`)
);
--> statement-breakpoint
CREATE TABLE `staff_roles` (
	`id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`staff_id` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`role` varchar(20) character set ascii collate ascii_bin NOT NULL,
	`site_id` varchar(16) character set ascii collate ascii_bin,
	CONSTRAINT `staff_roles_id` PRIMARY KEY(`id`),
	CONSTRAINT `staff_roles_once` UNIQUE(`staff_id`,`role`,`site_id`)
);
--> statement-breakpoint
ALTER TABLE `alerts` ADD CONSTRAINT `alerts_follow_up_id_follow_ups_id_fk` FOREIGN KEY (`follow_up_id`) REFERENCES `follow_ups`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `alerts` ADD CONSTRAINT `alerts_site_id_sites_id_fk` FOREIGN KEY (`site_id`) REFERENCES `sites`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `attempts` ADD CONSTRAINT `attempts_follow_up_id_follow_ups_id_fk` FOREIGN KEY (`follow_up_id`) REFERENCES `follow_ups`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `attempts` ADD CONSTRAINT `attempts_carer_id_carers_id_fk` FOREIGN KEY (`carer_id`) REFERENCES `carers`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `attempts` ADD CONSTRAINT `attempts_staff_id_staff_id_fk` FOREIGN KEY (`staff_id`) REFERENCES `staff`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `check_ins` ADD CONSTRAINT `check_ins_follow_up_id_follow_ups_id_fk` FOREIGN KEY (`follow_up_id`) REFERENCES `follow_ups`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `check_ins` ADD CONSTRAINT `check_ins_carer_id_carers_id_fk` FOREIGN KEY (`carer_id`) REFERENCES `carers`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `decisions` ADD CONSTRAINT `decisions_follow_up_id_follow_ups_id_fk` FOREIGN KEY (`follow_up_id`) REFERENCES `follow_ups`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `decisions` ADD CONSTRAINT `decisions_measurement_id_measurements_id_fk` FOREIGN KEY (`measurement_id`) REFERENCES `measurements`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `decisions` ADD CONSTRAINT `decisions_decided_by_staff_id_fk` FOREIGN KEY (`decided_by`) REFERENCES `staff`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `follow_ups` ADD CONSTRAINT `follow_ups_newborn_id_newborns_id_fk` FOREIGN KEY (`newborn_id`) REFERENCES `newborns`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `follow_ups` ADD CONSTRAINT `follow_ups_birth_site_id_sites_id_fk` FOREIGN KEY (`birth_site_id`) REFERENCES `sites`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `follow_ups` ADD CONSTRAINT `follow_ups_clinic_id_sites_id_fk` FOREIGN KEY (`clinic_id`) REFERENCES `sites`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `parent_links` ADD CONSTRAINT `parent_links_follow_up_id_follow_ups_id_fk` FOREIGN KEY (`follow_up_id`) REFERENCES `follow_ups`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `parent_links` ADD CONSTRAINT `parent_links_carer_id_carers_id_fk` FOREIGN KEY (`carer_id`) REFERENCES `carers`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `transitions` ADD CONSTRAINT `transitions_follow_up_id_follow_ups_id_fk` FOREIGN KEY (`follow_up_id`) REFERENCES `follow_ups`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `visits` ADD CONSTRAINT `visits_follow_up_id_follow_ups_id_fk` FOREIGN KEY (`follow_up_id`) REFERENCES `follow_ups`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `visits` ADD CONSTRAINT `visits_clinic_id_sites_id_fk` FOREIGN KEY (`clinic_id`) REFERENCES `sites`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `calendar_feeds` ADD CONSTRAINT `calendar_feeds_site_id_sites_id_fk` FOREIGN KEY (`site_id`) REFERENCES `sites`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `message_templates` ADD CONSTRAINT `message_templates_organisation_id_organisations_id_fk` FOREIGN KEY (`organisation_id`) REFERENCES `organisations`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `messages` ADD CONSTRAINT `messages_follow_up_id_follow_ups_id_fk` FOREIGN KEY (`follow_up_id`) REFERENCES `follow_ups`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `messages` ADD CONSTRAINT `messages_site_id_sites_id_fk` FOREIGN KEY (`site_id`) REFERENCES `sites`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `messages` ADD CONSTRAINT `messages_carer_id_carers_id_fk` FOREIGN KEY (`carer_id`) REFERENCES `carers`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `thread_entries` ADD CONSTRAINT `thread_entries_follow_up_id_follow_ups_id_fk` FOREIGN KEY (`follow_up_id`) REFERENCES `follow_ups`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `thread_entries` ADD CONSTRAINT `thread_entries_carer_id_carers_id_fk` FOREIGN KEY (`carer_id`) REFERENCES `carers`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `carers` ADD CONSTRAINT `carers_newborn_id_newborns_id_fk` FOREIGN KEY (`newborn_id`) REFERENCES `newborns`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `measurements` ADD CONSTRAINT `measurements_newborn_id_newborns_id_fk` FOREIGN KEY (`newborn_id`) REFERENCES `newborns`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `newborns` ADD CONSTRAINT `newborns_organisation_id_organisations_id_fk` FOREIGN KEY (`organisation_id`) REFERENCES `organisations`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `newborns` ADD CONSTRAINT `newborns_birth_site_id_sites_id_fk` FOREIGN KEY (`birth_site_id`) REFERENCES `sites`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `phototherapy_courses` ADD CONSTRAINT `phototherapy_courses_newborn_id_newborns_id_fk` FOREIGN KEY (`newborn_id`) REFERENCES `newborns`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `weights` ADD CONSTRAINT `weights_newborn_id_newborns_id_fk` FOREIGN KEY (`newborn_id`) REFERENCES `newborns`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `closed_days` ADD CONSTRAINT `closed_days_site_id_sites_id_fk` FOREIGN KEY (`site_id`) REFERENCES `sites`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `openings` ADD CONSTRAINT `openings_site_id_sites_id_fk` FOREIGN KEY (`site_id`) REFERENCES `sites`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `sites` ADD CONSTRAINT `sites_organisation_id_organisations_id_fk` FOREIGN KEY (`organisation_id`) REFERENCES `organisations`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `invitations` ADD CONSTRAINT `invitations_staff_id_staff_id_fk` FOREIGN KEY (`staff_id`) REFERENCES `staff`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `sessions` ADD CONSTRAINT `sessions_user_id_staff_id_fk` FOREIGN KEY (`user_id`) REFERENCES `staff`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `staff` ADD CONSTRAINT `staff_organisation_id_organisations_id_fk` FOREIGN KEY (`organisation_id`) REFERENCES `organisations`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `staff_roles` ADD CONSTRAINT `staff_roles_staff_id_staff_id_fk` FOREIGN KEY (`staff_id`) REFERENCES `staff`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `staff_roles` ADD CONSTRAINT `staff_roles_site_id_sites_id_fk` FOREIGN KEY (`site_id`) REFERENCES `sites`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX `alerts_owed` ON `alerts` (`site_id`,`role`,`settled_at`,`due_at`);--> statement-breakpoint
CREATE INDEX `alerts_follow_up` ON `alerts` (`follow_up_id`,`settled_at`);--> statement-breakpoint
CREATE INDEX `alerts_climb` ON `alerts` (`settled_at`,`climb_at`);--> statement-breakpoint
CREATE INDEX `attempts_follow_up` ON `attempts` (`follow_up_id`,`at`);--> statement-breakpoint
CREATE INDEX `check_ins_follow_up` ON `check_ins` (`follow_up_id`,`answered_at`);--> statement-breakpoint
CREATE INDEX `decisions_follow_up` ON `decisions` (`follow_up_id`,`decided_at`);--> statement-breakpoint
CREATE INDEX `follow_ups_newborn` ON `follow_ups` (`newborn_id`);--> statement-breakpoint
CREATE INDEX `follow_ups_clinic_due` ON `follow_ups` (`clinic_id`,`stage`,`next_step_due_at`);--> statement-breakpoint
CREATE INDEX `follow_ups_unit` ON `follow_ups` (`birth_site_id`,`stage`,`planned_discharge_at`);--> statement-breakpoint
CREATE INDEX `follow_ups_climb` ON `follow_ups` (`next_step_climb_at`);--> statement-breakpoint
CREATE INDEX `follow_ups_owed` ON `follow_ups` (`next_step_site_id`,`next_step_role`,`next_step_due_at`);--> statement-breakpoint
CREATE INDEX `visits_follow_up` ON `visits` (`follow_up_id`,`starts_at`);--> statement-breakpoint
CREATE INDEX `visits_clinic_day` ON `visits` (`clinic_id`,`starts_at`);--> statement-breakpoint
CREATE INDEX `calendar_feeds_staff` ON `calendar_feeds` (`staff_id`);--> statement-breakpoint
CREATE INDEX `messages_claim` ON `messages` (`state`,`priority`,`run_at`,`id`);--> statement-breakpoint
CREATE INDEX `messages_lease` ON `messages` (`state`,`locked_until`);--> statement-breakpoint
CREATE INDEX `messages_follow_up` ON `messages` (`follow_up_id`,`run_at`);--> statement-breakpoint
CREATE INDEX `messages_provider` ON `messages` (`provider_id`);--> statement-breakpoint
CREATE INDEX `messages_fallback` ON `messages` (`state`,`channel`,`fell_back_at`,`sent_at`);--> statement-breakpoint
CREATE INDEX `provider_events_waiting` ON `provider_events` (`handled_at`,`received_at`);--> statement-breakpoint
CREATE INDEX `thread_entries_follow_up` ON `thread_entries` (`follow_up_id`,`at`);--> statement-breakpoint
CREATE INDEX `thread_entries_phone` ON `thread_entries` (`phone`,`at`);--> statement-breakpoint
CREATE INDEX `watch_findings_open` ON `watch_findings` (`settled_at`,`kind`);--> statement-breakpoint
CREATE INDEX `watch_findings_subject` ON `watch_findings` (`kind`,`subject`);--> statement-breakpoint
CREATE INDEX `carers_phone` ON `carers` (`phone`);--> statement-breakpoint
CREATE INDEX `measurements_newborn` ON `measurements` (`newborn_id`,`measured_at`);--> statement-breakpoint
CREATE INDEX `newborns_name` ON `newborns` (`organisation_id`,`family_name`);--> statement-breakpoint
CREATE INDEX `newborns_birth` ON `newborns` (`organisation_id`,`born_on`);--> statement-breakpoint
CREATE INDEX `phototherapy_courses_newborn` ON `phototherapy_courses` (`newborn_id`,`started_at`);--> statement-breakpoint
CREATE INDEX `weights_newborn` ON `weights` (`newborn_id`,`weighed_at`);--> statement-breakpoint
CREATE INDEX `openings_site` ON `openings` (`site_id`,`weekday`);--> statement-breakpoint
CREATE INDEX `sites_organisation` ON `sites` (`organisation_id`);--> statement-breakpoint
CREATE INDEX `access_records_time` ON `access_records` (`organisation_id`,`at`);--> statement-breakpoint
CREATE INDEX `access_records_follow_up` ON `access_records` (`follow_up_id`,`at`);--> statement-breakpoint
CREATE INDEX `invitations_staff` ON `invitations` (`staff_id`);--> statement-breakpoint
CREATE INDEX `sessions_user` ON `sessions` (`user_id`);--> statement-breakpoint
CREATE INDEX `sessions_expiry` ON `sessions` (`expires_at`);--> statement-breakpoint
CREATE INDEX `staff_organisation` ON `staff` (`organisation_id`);--> statement-breakpoint
CREATE INDEX `staff_roles_site` ON `staff_roles` (`site_id`,`role`);