// expect: stand gated
// expect: flut gated
// Größe und Höhe: äöü – 水位計 – the comments are not ASCII, so characters are no offsets.
module pegel (
	input  logic		clk,	// Takt ⏱
	input  logic		lies,	/* lädt */
	input  logic [9:0]	wert,
	output logic [9:0]	stand,	flut	// größter „Stand“
);
	always_ff @(posedge clk)	// übernimmt
		if (lies)	stand	<=	wert;	// 水
	/* ⚓ */	always_ff @(posedge clk) begin
		if (lies /* ü */ && wert > flut)	flut <= wert;
	end
endmodule
