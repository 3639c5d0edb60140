ALTER TABLE `session_pourers` ADD `step` text DEFAULT 'key' NOT NULL;--> statement-breakpoint
ALTER TABLE `sessions` ADD `coding` text DEFAULT 'pourer' NOT NULL;