// expect: stand gated
// expect: flut gated
// Größe und Höhe: äöü – 水位計 – the comments are not ASCII, so characters are no offsets.
module pegel (
	input  logic		clk,	// Takt ⏱
	input  logic		lies,	/* lädt */
	input  logic [9:0]	wert,
	output logic [9:0]	stand,	flut,	// größter „Stand“
	input wire	test_en
);
	// stillclock: stand sleeps unless it is written
	wire wake_stand = lies;
	wire gclk_stand;
	stillclock_icg u_icg_stand (.clk(clk), .wake(wake_stand), .test(test_en), .gclk(gclk_stand));
	always_ff @(posedge gclk_stand)	// übernimmt
		if (lies)	stand	<=	wert;	// 水
	/* ⚓ */	// stillclock: flut sleeps unless it is written
	wire wake_flut = lies && wert > flut;
	wire gclk_flut;
	stillclock_icg u_icg_flut (.clk(clk), .wake(wake_flut), .test(test_en), .gclk(gclk_flut));
	always_ff @(posedge gclk_flut) begin
		if (lies /* ü */ && wert > flut)	flut <= wert;
	end
endmodule
