ALTER TABLE `visits` DROP INDEX `visits_place`;--> statement-breakpoint
ALTER TABLE `visits` ADD CONSTRAINT `visits_place` UNIQUE(`clinic_id`,`starts_at`,`kind`,`place_number`,`holds_place`);